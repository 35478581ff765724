import { useEffect, useState } from "react";
import { Button } from "#src/ui/button.tsx";

/** How long the button says that it is done, ms. */
const SAID_MS = 2500;

/** Copies the workings as plain text; where the browser refuses, shows the text to be taken by hand. */
export const CopyText = ({ text }: { text: string }) => {
  const [outcome, setOutcome] = useState<"copied" | "refused" | null>(null);
  useEffect(() => {
    if (outcome !== "copied") return;
    const timer = setTimeout(() => setOutcome(null), SAID_MS);
    return () => clearTimeout(timer);
  }, [outcome]);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      setOutcome("copied");
    } catch {
      setOutcome("refused");
    }
  };
  return (
    <div>
      <span className="flex items-center gap-3">
        <Button onClick={() => void copy()}>Copy as text</Button>
        <span role="status" className="text-xs text-soft">
          {outcome === "copied" ? "Copied, with every digit." : ""}
        </span>
      </span>
      {outcome === "refused" ? (
        <label className="mt-2 block text-xs text-soft">
          The browser did not let it be copied. Take it from here:
          <textarea
            readOnly
            rows={8}
            value={text}
            onFocus={(event) => event.target.select()}
            className="mt-1 w-full rounded border border-edge bg-sheet p-2 font-mono text-[11px] text-ink"
          />
        </label>
      ) : null}
    </div>
  );
};
