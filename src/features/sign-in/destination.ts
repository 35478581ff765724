import type { Session } from "#shared/api/session.ts";
import { paths } from "#src/app/paths.ts";

/** An address of this application, or nothing: a link from elsewhere must not lead a person away after signing in. */
export const ownAddress = (next: string | null, origin: string): string | undefined => {
  if (!next?.startsWith("/") || !URL.canParse(next, origin)) return undefined;
  const url = new URL(next, origin);
  if (url.origin !== origin || url.pathname === paths.signIn.pattern) return undefined;
  return url.pathname + url.search + url.hash;
};

/** Where someone lands who asked for nothing in particular: in their programme when there is but one. */
export const homeOf = ({ programmes }: Pick<Session, "programmes">): string => {
  const [first, second] = programmes;
  return first && !second ? paths.programme.to(first.id) : paths.programmes.to();
};

/** The programme that an invitation opened: the one that was not there before, else the one of that name. */
export const joinedProgramme = (before: Session, after: Session, name: string | null): string => {
  const known = new Set(before.programmes.map(({ id }) => id));
  const joined =
    after.programmes.find(({ id }) => !known.has(id)) ?? after.programmes.find((p) => p.name === name);
  return joined ? paths.programme.to(joined.id) : homeOf(after);
};
