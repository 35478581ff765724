import { type Action, can } from "#shared/policy/rights.ts";
import { useSession } from "#src/api/session.ts";
import { useProgrammeId } from "./programme-path.ts";

/** Whether the person at hand may do that in the programme of the address: hides controls, never decides. */
export const useCan = (): ((action: Action) => boolean) => {
  const programmeId = useProgrammeId();
  const roles = useSession().programmes.find((programme) => programme.id === programmeId)?.roles ?? [];
  return (action) => can({ roles }, action);
};
