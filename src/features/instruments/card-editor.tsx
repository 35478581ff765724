import { type ReactNode, useRef, useState } from "react";
import type { Card } from "#shared/api/instruments.ts";
import { ApiError } from "#src/api/client.ts";
import { useMakeCard, useSaveCard } from "#src/api/instruments.ts";
import { useForm } from "#src/lib/form.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { Pill } from "#src/ui/pill.tsx";
import { SectionTitle } from "#src/ui/section-title.tsx";
import { Campaigns } from "./campaigns.tsx";
import {
  type CardDraft,
  draftOf,
  draftSchema,
  emptyDraft,
  readFigure,
  usableSettings,
} from "./card-draft.ts";
import { CardFields } from "./card-form.tsx";
import { NoiseLede } from "./noise-lede.tsx";
import { NoiseNumbers } from "./noise-numbers.tsx";
import { NoisePlot } from "./noise-plot.tsx";
import { PrecisionTable } from "./precision-table.tsx";
import { SaturationNote } from "./saturation-note.tsx";

interface Props {
  programmeId: string;
  /** Null for a new one. */
  card: Card | null;
  /** Choice among the cards; stands above the form. */
  choice: ReactNode;
  onSaved: (card: Card) => void;
}

const useCardForm = ({ programmeId, card, onSaved }: Props) => {
  const make = useMakeCard(programmeId);
  const save = useSaveCard(programmeId);
  // The version that was on screen when typing began: a newer one that arrives meanwhile must not pass for it.
  const [opened, setOpened] = useState(card);
  /** Set by the button that sends the form: whether a new card is wanted instead of a new version. */
  const isCopy = useRef(false);
  const form = useForm({
    schema: draftSchema,
    initial: card ? draftOf(card) : emptyDraft(),
    send: async (body) => {
      const isNew = opened === null || isCopy.current;
      const saved = isNew
        ? await make.mutateAsync(body)
        : await save.mutateAsync({ id: opened.id, number: opened.number, ...body });
      setOpened(saved.card);
      form.set(draftOf(saved.card));
      announce(`Version ${saved.card.number} of ${saved.card.name} is saved.`);
      onSaved(saved.card);
    },
  });
  const isChanged = opened === null || JSON.stringify(form.values) !== JSON.stringify(draftOf(opened));
  const take = (newer: Card) => {
    setOpened(newer);
    form.set(draftOf(newer));
    form.forget();
  };
  return { form, opened, isChanged, isCopy, take };
};

const Origin = ({ card }: { card: Card }) => (
  <div className="mt-1">
    {card.isVerified ? (
      <Pill tone="calm" title={card.source}>
        source given
      </Pill>
    ) : (
      <Pill tone="warning">no source: unverified</Pill>
    )}{" "}
    <span className="text-xs text-soft">saved by {card.savedBy.name}</span>
  </div>
);

/** What the figures mean: the sentence, the picture, the numbers behind it. */
const Meaning = ({
  draft,
  magnitude,
  text,
  onText,
}: {
  draft: CardDraft;
  magnitude: number;
  text: string;
  onText: (text: string) => void;
}) => {
  const settings = usableSettings(draft);
  if (!settings)
    return (
      <p className="text-soft" role="status">
        The picture comes back once every figure at the side can be used.
      </p>
    );
  return (
    <>
      <NoiseLede card={settings} magnitude={magnitude} text={text} onText={onText} />
      <p className="mt-1 mb-3 text-xs text-soft">
        total and its parts, one hour
        {settings.model === "detector" ? `, airmass ${settings.airmass}` : ""}; hatched: saturated or too
        faint
      </p>
      <SaturationNote card={settings} magnitude={magnitude} />
      <div className="rounded border border-rule bg-sheet p-3">
        <NoisePlot card={settings} magnitude={magnitude} />
      </div>
      <NoiseNumbers card={settings} />
    </>
  );
};

/** A card with its picture: every change of a figure shows at once, and saving makes a new version. */
export const CardEditor = (props: Props) => {
  const { programmeId, card, choice } = props;
  const mayEdit = useCan()("instrument.edit");
  const { form, opened, isChanged, isCopy, take } = useCardForm(props);
  const [text, setText] = useState("10.0");
  const read = readFigure(text);
  const magnitude = Number.isFinite(read) ? read : 10;
  const settings = usableSettings(form.values);
  const isStale = form.problem instanceof ApiError && form.problem.code === "changed-meanwhile";
  return (
    <main className="flex min-h-full flex-col xl:grid xl:grid-cols-[320px_minmax(0,1fr)_360px]">
      <title>Instruments · Shortlight</title>
      <h1 className="sr-only">Instruments</h1>
      <section aria-label="Instrument card" className="border-rule p-5 xl:border-r">
        {choice}
        <p className="mt-4 text-xs text-soft">
          {opened ? `Instrument card · version ${opened.number}` : "New instrument card"}
        </p>
        <h2 className="text-[22px] wrap-anywhere">{opened?.name ?? "Not saved yet"}</h2>
        {opened ? <Origin card={opened} /> : null}
        <Form form={form} aria-label="Figures of the card" className="mt-4">
          {isStale && card && opened && card.number > opened.number ? (
            <Button onClick={() => take(card)}>Open version {card.number} instead of yours</Button>
          ) : null}
          <CardFields form={form} isReadOnly={!mayEdit} />
          {mayEdit ? (
            <div className="flex flex-wrap gap-2">
              <Button
                kind="main"
                type="submit"
                isBusy={form.isBusy}
                disabled={!isChanged}
                onClick={() => {
                  isCopy.current = false;
                }}
              >
                {opened ? `Save version ${opened.number + 1}` : "Make card"}
              </Button>
              {opened ? (
                <Button
                  type="submit"
                  disabled={form.isBusy}
                  onClick={() => {
                    isCopy.current = true;
                  }}
                >
                  Save as a new card
                </Button>
              ) : null}
              {opened && isChanged ? <Button onClick={() => take(opened)}>Take back changes</Button> : null}
            </div>
          ) : null}
        </Form>
      </section>
      <section aria-label="Noise" className="min-w-0 p-5 xl:sticky xl:top-0 xl:self-start xl:px-7">
        <Meaning draft={form.values} magnitude={magnitude} text={text} onText={setText} />
      </section>
      <aside className="border-rule bg-sheet xl:border-l" aria-label="Precision and campaigns">
        <div className="p-5 xl:sticky xl:top-0">
          {settings ? <PrecisionTable card={settings} magnitude={magnitude} /> : null}
          <Campaigns programmeId={programmeId} />
          <SectionTitle>Caution</SectionTitle>
          <p className="text-[13px] text-soft">
            Estimate. The observatory's own tools and rules decide where a telescope may point and how bright
            a star may be.
          </p>
        </div>
      </aside>
    </main>
  );
};
