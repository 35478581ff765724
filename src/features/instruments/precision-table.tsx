import { fixed } from "#shared/format/numbers.ts";
import type { CardSettings } from "#shared/science/cards.ts";
import { noiseParts } from "#shared/science/noise.ts";
import { LedgerTable } from "#src/ui/ledger-table.tsx";

const HOUR_S = 3600;
const TIMES: readonly { label: string; seconds: number }[] = [
  { label: "60 s", seconds: 60 },
  { label: "10 min", seconds: 600 },
  { label: "1 h", seconds: HOUR_S },
  { label: "6.5 h", seconds: 6.5 * HOUR_S },
];
/** Apertures beside the card's own, m. */
const APERTURES = [0.1, 0.2, 0.4, 0.6, 1, 2] as const;

/** Photon noise averages down with time; from one hour to another time it goes by the square root. */
const inTime = (photonInOneHour: number, seconds: number): number =>
  photonInOneHour * Math.sqrt(HOUR_S / seconds);

interface Row {
  name: string;
  photon: number;
  isOwn: boolean;
}

const byAperture = (card: CardSettings & { model: "detector" }, magnitude: number): Row[] =>
  [...new Set([...APERTURES, card.apertureM])]
    .sort((a, b) => a - b)
    .map((apertureM) => ({
      name: fixed(apertureM, apertureM % 0.1 < 1e-9 || apertureM % 0.1 > 0.1 - 1e-9 ? 1 : 2),
      photon: noiseParts({ ...card, apertureM }, magnitude).photon,
      isOwn: apertureM === card.apertureM,
    }));

const byMagnitude = (card: CardSettings, magnitude: number): Row[] =>
  [-2, -1, 0, 1, 2, 3].map((step) => ({
    name: fixed(magnitude + step, 1),
    photon: noiseParts(card, magnitude + step).photon,
    isOwn: step === 0,
  }));

/** Photon noise alone, the bound that nothing beats: by aperture for a telescope, by magnitude for a noise curve. */
export const PrecisionTable = ({ card, magnitude }: { card: CardSettings; magnitude: number }) => {
  const isDetector = card.model === "detector";
  const rows = isDetector ? byAperture(card, magnitude) : byMagnitude(card, magnitude);
  const compared =
    isDetector && card.comparisonStars !== undefined ? ", that of the comparison stars included" : "";
  const what = isDetector
    ? `Photon noise alone, ppm at magnitude ${fixed(magnitude, 1)}, this passband, exposed as this card does${compared}.`
    : "Photon noise alone, ppm, by magnitude.";
  return (
    <section aria-labelledby="precision-title">
      <h2 id="precision-title" className="text-[22px]">
        Precision table
      </h2>
      <p className="text-xs text-soft">{what}</p>
      <LedgerTable
        caption={what}
        heads={[
          {
            key: "row",
            label: (
              <>
                {isDetector ? "Aperture" : "Magnitude"}
                <span className="block font-normal text-soft">{isDetector ? "m" : "mag"}</span>
              </>
            ),
            isNumber: true,
          },
          ...TIMES.map(({ label }) => ({ key: label, label, isNumber: true })),
        ]}
      >
        {rows.map(({ name, photon, isOwn }) => (
          <tr key={name} className={isOwn ? "bg-sel" : ""}>
            <th
              scope="row"
              className="border-b border-hair px-2 text-right font-mono text-[13px] font-normal"
            >
              {name}
              {isOwn ? <span className="sr-only"> (this card)</span> : null}
            </th>
            {TIMES.map(({ label, seconds }) => (
              <td key={label} className="text-right font-mono text-[13px]">
                {fixed(inTime(photon, seconds), 0)}
              </td>
            ))}
          </tr>
        ))}
      </LedgerTable>
    </section>
  );
};
