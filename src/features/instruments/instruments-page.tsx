import { useQuery } from "@tanstack/react-query";
import { useSearchParams } from "react-router-dom";
import type { Card } from "#shared/api/instruments.ts";
import { cardsOptions } from "#src/api/instruments.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Select } from "#src/ui/inputs.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { CardEditor } from "./card-editor.tsx";

/** Which card is open stands in the address: `?card=<id>`, or `?card=new`. */
const useOpenCard = (cards: readonly Card[]) => {
  const [params, setParams] = useSearchParams();
  const asked = params.get("card");
  return {
    isNew: asked === "new",
    open: cards.find((card) => card.id === asked) ?? cards[0],
    show: (id: string, isReplaced = false) => setParams({ card: id }, { replace: isReplaced }),
  };
};

const NoCards = ({ onNew }: { onNew: (() => void) | null }) => (
  <main>
    <title>Instruments · Shortlight</title>
    <h1 className="sr-only">Instruments</h1>
    <EmptyState
      title="No instrument card yet."
      actions={
        onNew ? (
          <Button kind="main" onClick={onNew}>
            Make a card
          </Button>
        ) : null
      }
    >
      A card holds the figures of a telescope and its detector, or a measured noise curve. With one, the
      catalogue says how small a planet could still be found at each star.
      {onNew ? null : " Someone with the role Instrument team, Scientist or Lead makes it."}
    </EmptyState>
  </main>
);

export const InstrumentsPage = () => {
  const programmeId = useProgrammeId();
  const mayEdit = useCan()("instrument.edit");
  const cards = useQuery(cardsOptions(programmeId));
  const { isNew, open, show } = useOpenCard(cards.data ?? []);
  if (cards.isPending) return <Loading what="Reading the cards" />;
  if (cards.isError) return <ErrorNotice error={cards.error} onRetry={() => void cards.refetch()} isPage />;
  const isMaking = isNew && mayEdit;
  if (!open && !isMaking) return <NoCards onNew={mayEdit ? () => show("new") : null} />;
  const choice = (
    <div className="flex flex-wrap items-end gap-2">
      <div className="min-w-40 grow">
        <Select
          label="Card"
          value={isMaking ? "new" : open?.id}
          onChange={(event) => show(event.target.value)}
        >
          {cards.data.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
          {isMaking ? <option value="new">New card</option> : null}
        </Select>
      </div>
      {mayEdit && !isMaking ? <Button onClick={() => show("new")}>New card</Button> : null}
    </div>
  );
  return (
    <CardEditor
      key={isMaking ? "new" : open?.id}
      programmeId={programmeId}
      card={isMaking ? null : (open ?? null)}
      choice={choice}
      onSaved={(card) => show(card.id, true)}
    />
  );
};
