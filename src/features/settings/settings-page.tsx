import { useSuspenseQuery } from "@tanstack/react-query";
import { programmeOptions } from "#src/api/programmes.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Page, Section } from "#src/ui/page.tsx";
import { AboutForm } from "./about-form.tsx";
import { Invitations } from "./invitations.tsx";
import { InviteForm } from "./invite-form.tsx";
import { LeaveProgramme } from "./leave-programme.tsx";
import { Members } from "./members.tsx";
import { RecipeChoice } from "./recipe-choice.tsx";

/** The programme itself: what it is called, who is in it, by which recipe its catalogue is derived. */
export const SettingsPage = () => {
  const can = useCan();
  const { data: programme } = useSuspenseQuery(programmeOptions(useProgrammeId()));
  return (
    <Page title="Programme settings" over={programme.name}>
      <Section title="Programme" note="Name and purpose, as members and guests read them.">
        {can("programme.edit") ? (
          <AboutForm programme={programme} />
        ) : (
          <>
            <p className="font-medium wrap-anywhere">{programme.name}</p>
            <p className="text-soft wrap-anywhere">{programme.description || "No description."}</p>
          </>
        )}
      </Section>
      {can("member.read") ? (
        <Section title="Members" note="What someone may do is the sum of their roles.">
          <Members programmeId={programme.id} />
        </Section>
      ) : null}
      {can("member.edit") ? (
        <Section title="Invite someone" note="By a link in a mail that works once.">
          <InviteForm programmeId={programme.id} />
          <Invitations programmeId={programme.id} />
        </Section>
      ) : null}
      <Section title="Recipe" note="By which relations the stellar quantities are derived.">
        <RecipeChoice programme={programme} />
      </Section>
      <Section title="Leave">
        <LeaveProgramme programme={programme} />
      </Section>
    </Page>
  );
};
