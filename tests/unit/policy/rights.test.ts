import { describe, expect, test } from "vitest";
import { ACTIONS, type Action, can, RIGHTS, rolesThatCan } from "#shared/policy/rights.ts";
import { ROLE_LABELS, ROLES } from "#shared/policy/roles.ts";

describe("the table of rights", () => {
  test("grants exactly what stands in it, for each role alone", () => {
    for (const action of ACTIONS)
      for (const role of ROLES)
        expect(can({ roles: [role] }, action), `${role} ${action}`).toBe(
          (RIGHTS[action] as readonly string[]).includes(role),
        );
  });

  test("denies a stranger everything", () => {
    expect(ACTIONS.filter((action) => can({ roles: [] }, action))).toEqual([]);
  });

  test("denies what does not stand in it", () => {
    expect(can({ roles: [...ROLES] }, "list.burn" as Action)).toBe(false);
  });

  test("several roles grant what any of them does", () => {
    expect(can({ roles: ["guest", "curator"] }, "extract.edit")).toBe(true);
    expect(can({ roles: ["guest", "reviewer"] }, "extract.edit")).toBe(false);
  });

  test("a guest reads and changes nothing, and sees neither people nor logbook", () => {
    const granted = ACTIONS.filter((action) => can({ roles: ["guest"] }, action));
    expect(granted.every((action) => action.endsWith(".read"))).toBe(true);
    expect(granted).not.toContain("member.read");
    expect(granted).not.toContain("logbook.read");
  });

  test("letting people in is the administrator's alone", () => {
    expect(rolesThatCan("member.edit")).toEqual(["administrator"]);
  });

  test("every role has a name for people", () => {
    expect(Object.keys(ROLE_LABELS).sort()).toEqual([...ROLES].sort());
  });
});
