import { Link as RouterLink } from "react-router-dom";
import type { Link } from "#shared/api/session.ts";
import { useSession } from "#src/api/session.ts";
import { paths } from "#src/app/paths.ts";
import { Moment } from "#src/ui/moment.tsx";
import { JoinAnew } from "./join-anew.tsx";
import { JoinSignedIn, OtherAccount } from "./join-signed-in.tsx";
import { LinkGate } from "./link-gate.tsx";

const SignInFirst = ({ link, token }: { link: Link; token: string }) => (
  <>
    <p>
      There is an account for <span className="font-medium wrap-anywhere">{link.email}</span> already. Sign in
      with it to join.
    </p>
    <p className="mt-5">
      <RouterLink
        className="inline-flex min-h-8 items-center rounded border border-ink bg-ink px-3 py-1 text-[13px] text-paper hover:opacity-90"
        to={paths.signIn.to(paths.invitation.to(token))}
      >
        Sign in to join
      </RouterLink>
    </p>
  </>
);

const Joining = ({ link, token }: { link: Link; token: string }) => {
  const { person } = useSession();
  if (!link.hasAccount) return <JoinAnew link={link} token={token} signedInAs={person?.email} />;
  if (!person) return <SignInFirst link={link} token={token} />;
  // Addresses are kept in small letters on both sides.
  if (person.email !== link.email) return <OtherAccount link={link} token={token} email={person.email} />;
  return <JoinSignedIn link={link} token={token} />;
};

export const InvitationPage = () => (
  <LinkGate kind="invitations" title={(link) => `Join ${link.programme ?? "Shortlight"}`}>
    {(link, token) => (
      <>
        <Joining link={link} token={token} />
        <p className="mt-6 border-t border-hair pt-4 text-[13px] text-soft">
          The invitation is for {link.email}, works once, and ends at <Moment at={link.expiresAt} />.
        </p>
      </>
    )}
  </LinkGate>
);
