import { fixed } from "#shared/format/numbers.ts";
import type { CardSettings } from "#shared/science/cards.ts";
import { noiseParts } from "#shared/science/noise.ts";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { axesOf, magnitudeTicks, PARTS, usableAt } from "./noise-series.ts";

const WORDS = {
  usable: "",
  saturated: "saturated",
  "too faint": "too faint",
  never: "not measured",
} as const;

const ppm = (value: number): string => fixed(value, value >= 100 ? 0 : 1);

/** The numbers behind the picture of the noise. */
export const NoiseNumbers = ({ card }: { card: CardSettings }) => {
  const parts = PARTS.filter(({ key }) => key === "total" || noiseParts(card, card.faintLimit)[key] > 0);
  return (
    <details className="mt-3">
      <summary className="text-[13px] text-soft underline decoration-edge underline-offset-4">
        Numbers behind this picture
      </summary>
      <LedgerTable
        caption="Noise in one hour by magnitude, in parts per million"
        heads={[
          { key: "magnitude", label: "Magnitude", isNumber: true },
          ...parts.map(({ key, label }) => ({ key, label: `${label}, ppm`, isNumber: true })),
          { key: "note", label: "" },
        ]}
      >
        {magnitudeTicks(axesOf(card)).map((magnitude) => {
          const noise = noiseParts(card, magnitude);
          return (
            <tr key={magnitude}>
              <td className="text-right font-mono text-[13px]">{fixed(magnitude, 0)}</td>
              {parts.map(({ key }) => (
                <td key={key} className="text-right font-mono text-[13px]">
                  {ppm(noise[key])}
                </td>
              ))}
              <td className="text-xs text-soft">{WORDS[usableAt(card, magnitude)]}</td>
            </tr>
          );
        })}
      </LedgerTable>
    </details>
  );
};
