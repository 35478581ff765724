import { useQuery } from "@tanstack/react-query";
import { useSearchParams } from "react-router-dom";
import type { Mail } from "#shared/api/session.ts";
import { mailboxOptions } from "#src/api/session.ts";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { Page } from "#src/ui/page.tsx";
import { BodyText } from "./body-text.tsx";

interface ListProps {
  mails: readonly Mail[];
  opened: Mail | undefined;
  open: (id: string) => void;
}

const MailList = ({ mails, opened, open }: ListProps) => (
  <ul aria-label="Mails, newest first" className="border-b border-rule">
    {mails.map((mail) => (
      <li key={mail.id} className="border-t border-rule">
        <button
          type="button"
          aria-current={mail === opened ? "true" : undefined}
          onClick={() => open(mail.id)}
          className="w-full px-2 py-2.5 text-left hover:bg-sheet aria-[current]:bg-sel"
        >
          <span className="block font-medium wrap-anywhere">{mail.subject}</span>
          <span className="block text-[13px] text-soft wrap-anywhere">to {mail.to}</span>
          <Moment at={mail.createdAt} isShort />
        </button>
      </li>
    ))}
  </ul>
);

const OpenedMail = ({ mail }: { mail: Mail }) => (
  <article aria-label={mail.subject} className="rounded border border-rule bg-sheet p-5">
    <h2 className="text-[22px] wrap-anywhere">{mail.subject}</h2>
    <p className="mt-1 mb-4 border-b border-hair pb-3 text-[13px] text-soft">
      to <span className="text-ink wrap-anywhere">{mail.to}</span>, <Moment at={mail.createdAt} />
    </p>
    <BodyText body={mail.body} />
  </article>
);

const Content = () => {
  const mailbox = useQuery(mailboxOptions);
  const [params, setParams] = useSearchParams();
  if (mailbox.isPending) return <Loading />;
  if (!mailbox.data) return <ErrorNotice error={mailbox.error} onRetry={() => void mailbox.refetch()} />;
  const mails = mailbox.data;
  if (mails.length === 0)
    return (
      <EmptyState title="No mail yet.">
        Invitations and links for new passwords arrive here as they are written.
      </EmptyState>
    );
  const opened = mails.find(({ id }) => id === params.get("mail"));
  return (
    <div className="grid items-start gap-6 md:grid-cols-[18rem_minmax(0,1fr)]">
      <MailList mails={mails} opened={opened} open={(id) => setParams({ mail: id }, { replace: true })} />
      {opened ? <OpenedMail mail={opened} /> : <p className="py-3 text-soft">Choose a mail to read it.</p>}
    </div>
  );
};

/** What would have gone out by mail, on a demo installation that has no mail server. */
export const MailboxPage = () => (
  <Page
    title="Local mailbox"
    lede="This demo installation has no mail server. What it would send is kept here, for its administrators alone."
  >
    <Content />
  </Page>
);
