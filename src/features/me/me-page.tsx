import { useSession, useSignOutEverywhere } from "#src/api/session.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Page, Section } from "#src/ui/page.tsx";
import { NameForm } from "./name-form.tsx";
import { PasswordForm } from "./password-form.tsx";
import { ThemeChoice } from "./theme-choice.tsx";

const SignOutEverywhere = () => {
  const signOut = useSignOutEverywhere();
  return (
    <div className="flex flex-col gap-3">
      <p>Ends every session of yours, on all computers, this one too.</p>
      <ErrorNotice error={signOut.error} />
      <div>
        <Button isBusy={signOut.isPending} onClick={() => signOut.mutate()}>
          Sign out everywhere
        </Button>
      </div>
    </div>
  );
};

/** One's own account. */
export const MePage = () => {
  const { person } = useSession();
  if (!person) return null;
  return (
    <Page
      title="My account"
      lede={
        <>
          You sign in with <span className="font-medium text-ink wrap-anywhere">{person.email}</span>
          {person.isInstallationAdministrator ? " and administer this installation" : ""}.
        </>
      }
    >
      <Section title="Name" note="Stands beside what you do, in the logbook too.">
        <NameForm name={person.name} />
      </Section>
      <Section title="Theme" note="For all screens of yours. Shift + N changes it on this computer alone.">
        <ThemeChoice />
      </Section>
      <Section title="Password" note="Sessions open elsewhere end when it changes.">
        <PasswordForm email={person.email} />
      </Section>
      <Section title="Sessions">
        <SignOutEverywhere />
      </Section>
    </Page>
  );
};
