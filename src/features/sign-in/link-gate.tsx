import { useQuery } from "@tanstack/react-query";
import type { ReactNode } from "react";
import { Link as RouterLink, useParams } from "react-router-dom";
import type { Link } from "#shared/api/session.ts";
import { ApiError } from "#src/api/client.ts";
import { linkOptions } from "#src/api/session.ts";
import { paths } from "#src/app/paths.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { VisitorFrame } from "./visitor-frame.tsx";

interface Props {
  kind: "invitations" | "password-resets";
  title: (link: Link) => string;
  children: (link: Link, token: string) => ReactNode;
}

const TITLES: Readonly<Record<string, string>> = {
  "link-used": "This link was used before",
  "link-expired": "This link has ended",
  "link-withdrawn": "This link was withdrawn",
  "not-found": "This link leads nowhere",
};

const Unusable = ({ kind, error, retry }: { kind: Props["kind"]; error: unknown; retry: () => void }) => {
  const title = error instanceof ApiError ? TITLES[error.code] : undefined;
  return (
    <VisitorFrame title={title ?? "This link cannot be opened now"}>
      <ErrorNotice error={error} onRetry={title ? undefined : retry} />
      <p className="mt-5 flex flex-wrap gap-x-5 gap-y-2 text-[13px]">
        {kind === "password-resets" ? (
          <RouterLink
            className="underline decoration-edge underline-offset-4"
            to={paths.forgottenPassword.to()}
          >
            Ask for a new link
          </RouterLink>
        ) : null}
        <RouterLink className="underline decoration-edge underline-offset-4" to={paths.signIn.to()}>
          Go to signing in
        </RouterLink>
      </p>
    </VisitorFrame>
  );
};

/** Reads what a link from a mail is for, and says so plainly where it can no longer be used. */
export const LinkGate = ({ kind, title, children }: Props) => {
  const { token = "" } = useParams();
  const { data, error, refetch } = useQuery({
    ...linkOptions(kind, token),
    // What is on screen stays after the link was used by it.
    staleTime: Number.POSITIVE_INFINITY,
  });
  if (data) return <VisitorFrame title={title(data)}>{children(data, token)}</VisitorFrame>;
  if (error) return <Unusable kind={kind} error={error} retry={() => void refetch()} />;
  return (
    <VisitorFrame title="One moment">
      <Loading what="Looking at the link" />
    </VisitorFrame>
  );
};
