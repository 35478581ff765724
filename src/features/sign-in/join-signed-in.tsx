import { useNavigate } from "react-router-dom";
import type { Link } from "#shared/api/session.ts";
import { useJoin, useSession, useSignOut } from "#src/api/session.ts";
import { paths } from "#src/app/paths.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { joinedProgramme } from "./destination.ts";

interface Props {
  link: Link;
  token: string;
}

/** For someone who is signed in with the invited address. */
export const JoinSignedIn = ({ link, token }: Props) => {
  const navigate = useNavigate();
  const before = useSession();
  const join = useJoin(token);
  const enter = async () => {
    const { session } = await join.mutateAsync();
    navigate(joinedProgramme(before, session, link.programme), { replace: true });
  };
  return (
    <div className="flex flex-col gap-4">
      <p>
        You are signed in as <span className="font-medium">{before.person?.name}</span>.
      </p>
      <ErrorNotice error={join.error} />
      <div>
        {/* The failure is shown above from the mutation itself. */}
        <Button kind="main" isBusy={join.isPending} onClick={() => void enter().catch(() => undefined)}>
          Join
        </Button>
      </div>
    </div>
  );
};

/** Somebody else is signed in in this browser. */
export const OtherAccount = ({ link, token, email }: Props & { email: string }) => {
  const signOut = useSignOut(paths.invitation.to(token));
  return (
    <div className="flex flex-col gap-4">
      <p>
        This invitation is for <span className="font-medium wrap-anywhere">{link.email}</span>, and you are
        signed in as <span className="font-medium wrap-anywhere">{email}</span>. Sign out, then sign in with
        the invited address.
      </p>
      <ErrorNotice error={signOut.error} />
      <div>
        <Button kind="main" isBusy={signOut.isPending} onClick={() => signOut.mutate()}>
          Sign out
        </Button>
      </div>
    </div>
  );
};
