import { queryOptions, useMutation, useQueryClient, useSuspenseQuery } from "@tanstack/react-query";
import type { Link, Mail, Session } from "#shared/api/session.ts";
import { paths } from "#src/app/paths.ts";
import { get, keepSession, request } from "./client.ts";

const adopt = ({ session }: { session: Session }): Session => {
  keepSession(session);
  return session;
};

export const sessionOptions = queryOptions({
  queryKey: ["session"],
  queryFn: async () => adopt(await get<{ session: Session }>("/session")),
  staleTime: 60_000,
});

/** The session; every screen inside the shell has one with a person. */
export const useSession = (): Session => useSuspenseQuery(sessionOptions).data;

/** A change that answers with the session it leaves. */
const useSessionChange = <V>(send: (input: V) => Promise<{ session: Session }>) => {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: (answer) => client.setQueryData(sessionOptions.queryKey, adopt(answer)),
  });
};

export const useSignIn = () =>
  useSessionChange((body: { email: string; password: string }) => request("POST", "/session", body));
export const useAcceptInvitation = (token: string) =>
  useSessionChange((body: { name: string; password: string }) =>
    request("POST", `/invitations/${token}`, body),
  );
/** For someone who has an account and is signed in with it. */
export const useJoin = (token: string) =>
  useSessionChange<void>(() => request("POST", `/invitations/${token}/join`));
export const useResetPassword = (token: string) =>
  useSessionChange((body: { password: string }) => request("POST", `/password-resets/${token}`, body));
export const useChangeMe = () =>
  useSessionChange((body: { name?: string; theme?: string }) => request("PATCH", "/me", body));

/** A page loaded anew keeps nothing of one person's data for the next; `next` is where signing in again leads. */
const useLeave = (path: string, next?: string) =>
  useMutation({
    mutationFn: () => request<void>("DELETE", path),
    onSuccess: () => window.location.assign(paths.signIn.to(next, "signed-out")),
  });
export const useSignOut = (next?: string) => useLeave("/session", next);
export const useSignOutEverywhere = () => useLeave("/sessions");

export const useChangePassword = () =>
  useMutation({
    mutationFn: (body: { current: string; next: string }) => request<void>("PUT", "/me/password", body),
  });
export const useRequestPasswordReset = () =>
  useMutation({ mutationFn: (body: { email: string }) => request<void>("POST", "/password-resets", body) });

export const linkOptions = (kind: "invitations" | "password-resets", token: string) =>
  queryOptions({
    queryKey: ["link", kind, token],
    queryFn: async () => (await get<{ link: Link }>(`/${kind}/${token}`)).link,
    retry: false,
  });

export const mailboxOptions = queryOptions({
  queryKey: ["mailbox"],
  queryFn: async () => (await get<{ mails: Mail[] }>("/mailbox")).mails,
  refetchInterval: 10_000,
});
