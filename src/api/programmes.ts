import {
  infiniteQueryOptions,
  type QueryClient,
  queryOptions,
  useMutation,
  useQueryClient,
} from "@tanstack/react-query";
import type { Invitation, LogbookLine, Member, Programme } from "#shared/api/programmes.ts";
import type { Role } from "#shared/policy/roles.ts";
import { get, request } from "./client.ts";
import { sessionOptions } from "./session.ts";

export const programmeKeys = {
  /** Everything of a programme: what a change of its catalogue makes stale. */
  all: (programmeId: string) => ["programme", programmeId] as const,
  part: (programmeId: string, ...part: unknown[]) => ["programme", programmeId, ...part] as const,
};

/** The programmes the person is a member of. */
export const programmesOptions = queryOptions({
  queryKey: ["programmes"],
  queryFn: async () => (await get<{ programmes: Programme[] }>("/programmes")).programmes,
});

const base = (programmeId: string): string => `/programmes/${programmeId}`;

export const programmeOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "itself"),
    queryFn: async () => (await get<{ programme: Programme }>(base(programmeId))).programme,
  });

export const membersOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "members"),
    queryFn: async () => (await get<{ members: Member[] }>(`${base(programmeId)}/members`)).members,
  });

export const invitationsOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "invitations"),
    queryFn: async () =>
      (await get<{ invitations: Invitation[] }>(`${base(programmeId)}/invitations`)).invitations,
  });

export const logbookOptions = (programmeId: string) =>
  infiniteQueryOptions({
    queryKey: programmeKeys.part(programmeId, "logbook"),
    queryFn: ({ pageParam }) =>
      get<{ lines: LogbookLine[]; next?: string }>(
        `${base(programmeId)}/logbook${pageParam ? `?cursor=${encodeURIComponent(pageParam)}` : ""}`,
      ),
    initialPageParam: "",
    getNextPageParam: (page) => page.next,
  });

/** A change in a programme; what it may have touched is read again. */
export const useProgrammeChange = <V, R>(programmeId: string, send: (input: V) => Promise<R>) => {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: () => client.invalidateQueries({ queryKey: programmeKeys.all(programmeId) }),
  });
};

/** The session carries the names of one's programmes and the roles in them. */
const refreshOwn = async (client: QueryClient): Promise<void> => {
  await client.invalidateQueries({ queryKey: programmesOptions.queryKey });
  await client.invalidateQueries({ queryKey: sessionOptions.queryKey });
};

/** A change that may touch what the person at hand may do, or what the programme is called. */
const useOwnChange = <V, R>(programmeId: string, send: (input: V) => Promise<R>) => {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: async () => {
      await refreshOwn(client);
      await client.invalidateQueries({ queryKey: programmeKeys.all(programmeId) });
    },
  });
};

export const useCreateProgramme = () => {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { name: string; description: string }) =>
      request<{ programme: Programme }>("POST", "/programmes", body),
    onSuccess: () => refreshOwn(client),
  });
};
export const useEditProgramme = (programmeId: string) =>
  useOwnChange(programmeId, (body: { name?: string; description?: string; version: number }) =>
    request<{ programme: Programme }>("PATCH", base(programmeId), body),
  );
export const useSetRoles = (programmeId: string) =>
  useOwnChange(programmeId, ({ personId, roles }: { personId: string; roles: Role[] }) =>
    request("PATCH", `${base(programmeId)}/members/${personId}`, { roles }),
  );
export const useRemoveMember = (programmeId: string) =>
  useProgrammeChange(programmeId, (personId: string) =>
    request("DELETE", `${base(programmeId)}/members/${personId}`),
  );
export const useInvite = (programmeId: string) =>
  useProgrammeChange(programmeId, (body: { email: string; roles: Role[] }) =>
    request<{ invitation: Invitation }>("POST", `${base(programmeId)}/invitations`, body),
  );
export const useWithdrawInvitation = (programmeId: string) =>
  useProgrammeChange(programmeId, (id: string) =>
    request("DELETE", `${base(programmeId)}/invitations/${id}`),
  );

/** Leaves the programme; `away` brings the person elsewhere before its data is forgotten. */
export const useLeaveProgramme = (programmeId: string, away: () => Promise<void> | void) => {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => request<void>("DELETE", `${base(programmeId)}/members/me`),
    onSuccess: async () => {
      await away();
      await refreshOwn(client);
      client.removeQueries({ queryKey: programmeKeys.all(programmeId) });
    },
  });
};
