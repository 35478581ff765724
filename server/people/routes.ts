import { z } from "zod";
import { invitation, invitationBody, member, rolesBody } from "#shared/api/programmes.ts";
import { invitationAcceptBody, link, meBody, session } from "#shared/api/session.ts";
import { currentSession, signIn } from "../auth/session-answer.ts";
import type { Routes } from "../http/route.ts";
import { acceptInvitation, joinByInvitation, readInvitation } from "./accept-invitation.ts";
import { invite, listInvitations, withdrawInvitation } from "./invitations.ts";
import { presentInvitation, presentMember } from "./present.ts";
import { changeProfile } from "./profile.ts";
import { changeRoles, listMembers, removeMember } from "./service.ts";

const sessionAnswer = z.object({ session });
const MEMBERS = "/programmes/:programmeId/members";
const INVITATIONS = "/programmes/:programmeId/invitations";

const addMemberRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: MEMBERS, access: "member.read", answer: z.object({ members: z.array(member) }) },
    async ({ deps, programmeId }) => ({
      members: (await listMembers(deps, programmeId)).map(presentMember),
    }),
  );

  routes.add(
    {
      method: "patch",
      path: `${MEMBERS}/:personId`,
      access: "member.edit",
      body: rolesBody,
      answer: z.object({ member }),
    },
    async ({ deps, caller, programmeId, params, body }) => ({
      member: presentMember(await changeRoles(deps, caller, programmeId, params.personId ?? "", body.roles)),
    }),
  );

  // Before the route with an id: anyone may leave, whatever else they may do.
  routes.add(
    { method: "delete", path: `${MEMBERS}/me`, access: "programme.read" },
    ({ deps, caller, programmeId }) => removeMember(deps, caller, programmeId, caller.id),
  );

  routes.add(
    { method: "delete", path: `${MEMBERS}/:personId`, access: "member.edit" },
    ({ deps, caller, programmeId, params }) => removeMember(deps, caller, programmeId, params.personId ?? ""),
  );
};

const addInvitingRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "get",
      path: INVITATIONS,
      access: "member.edit",
      answer: z.object({ invitations: z.array(invitation) }),
    },
    async ({ deps, programmeId }) => ({
      invitations: (await listInvitations(deps, programmeId)).map((link) =>
        presentInvitation(link, deps.now()),
      ),
    }),
  );

  routes.add(
    {
      method: "post",
      path: INVITATIONS,
      access: "member.edit",
      body: invitationBody,
      status: 201,
      answer: z.object({ invitation }),
    },
    async ({ deps, caller, programmeId, body }) => ({
      invitation: presentInvitation(await invite(deps, caller, programmeId, body), deps.now()),
    }),
  );

  routes.add(
    { method: "delete", path: `${INVITATIONS}/:invitationId`, access: "member.edit" },
    ({ deps, caller, programmeId, params }) =>
      withdrawInvitation(deps, caller, programmeId, params.invitationId ?? ""),
  );
};

const addJoiningRoutes = (routes: Routes): void => {
  const path = "/invitations/:token";

  routes.add(
    { method: "get", path, access: "anyone", answer: z.object({ link }) },
    async ({ deps, params }) => ({
      link: await readInvitation(deps, params.token ?? ""),
    }),
  );

  routes.add(
    { method: "post", path, access: "anyone", body: invitationAcceptBody, answer: sessionAnswer },
    async (at) => signIn(at, await acceptInvitation(at.deps, at.params.token ?? "", at.body)),
  );

  routes.add(
    { method: "post", path: `${path}/join`, access: "signed-in", answer: sessionAnswer },
    async (at) => {
      await joinByInvitation(at.deps, at.params.token ?? "", at.caller);
      return currentSession(at);
    },
  );
};

export const addPeopleRoutes = (routes: Routes): void => {
  routes.add(
    { method: "patch", path: "/me", access: "signed-in", body: meBody, answer: sessionAnswer },
    async (at) => {
      await changeProfile(at.deps, at.caller, at.body);
      return currentSession(at);
    },
  );
  addMemberRoutes(routes);
  addInvitingRoutes(routes);
  addJoiningRoutes(routes);
};
