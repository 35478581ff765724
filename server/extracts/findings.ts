import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { markFindings } from "./findings/blank-marks.ts";
import { delimiterFindings } from "./findings/dialect.ts";
import { fileFindings } from "./findings/file.ts";
import { formulaFindings } from "./findings/formula-texts.ts";
import { frameFindings } from "./findings/frame.ts";
import { headerFindings } from "./findings/header-names.ts";
import { identifierFindings } from "./findings/identifiers.ts";
import { type Knowledge, type Look, lookAt, NOTHING_KNOWN } from "./findings/look.ts";
import { magnitudeSystemFindings } from "./findings/magnitude-systems.ts";
import { meaningFindings, unknownMeanings } from "./findings/meanings.ts";
import { motionFindings } from "./findings/motions.ts";
import { decimalMarkFindings, numberTextFindings } from "./findings/number-texts.ts";
import { positionFindings } from "./findings/positions.ts";
import { raUnitFindings } from "./findings/ra-unit.ts";
import { rangeFindings } from "./findings/ranges.ts";
import { readerFindings } from "./findings/reader.ts";
import { rowCountFindings } from "./findings/row-counts.ts";
import { shiftedFindings } from "./findings/shifted-values.ts";
import { slipFindings } from "./findings/unit-slips.ts";
import { unitFindings } from "./findings/units.ts";
import type { Sample } from "./sample.ts";

export { isOpen } from "./findings/finding.ts";

const DETECTORS: readonly ((look: Look) => Finding[])[] = [
  delimiterFindings,
  decimalMarkFindings,
  rowCountFindings,
  meaningFindings,
  identifierFindings,
  raUnitFindings,
  frameFindings,
  motionFindings,
  magnitudeSystemFindings,
  unitFindings,
  slipFindings,
  shiftedFindings,
  markFindings,
  numberTextFindings,
  positionFindings,
  rangeFindings,
  formulaFindings,
];

const ORDER: Readonly<Record<Finding["level"], number>> = { stop: 0, ask: 1, note: 2 };

/** What the file is, in its own words and in its reader's; each said once. */
const ofFile = (sample: Sample, plan: ReadingPlan): Finding[] => {
  const own = [...fileFindings(sample, plan), ...headerFindings(sample)];
  const codes = new Set(own.map((f) => f.code));
  return [...own, ...readerFindings(sample.found, plan).filter((f) => !codes.has(f.code))];
};

/**
 * All that is to be said about the file under that plan, the gravest first. While a Stop or an Ask is open there is no
 * import.
 */
export const planFindings = (
  sample: Sample,
  plan: ReadingPlan,
  knowledge: Knowledge = NOTHING_KNOWN,
): Finding[] => {
  const file = ofFile(sample, plan);
  if (file.some((f) => f.level === "stop")) return file;
  const unknown = unknownMeanings({ plan, sample });
  if (unknown.length > 0) return [...file, ...unknown];
  const look = lookAt(sample, plan, knowledge);
  const found = [...file, ...DETECTORS.flatMap((detect) => detect(look))];
  return found.toSorted((a, b) => ORDER[a.level] - ORDER[b.level]);
};
