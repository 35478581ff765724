import type { Finding } from "#shared/api/extracts.ts";
import { julianYear, unreadFrame } from "../suggest-frame.ts";
import { ask, isAccepted, roughly, stop } from "./finding.ts";
import { columnOf, type Look, rowsWhere, type UsedColumn } from "./look.ts";

const FRAMES = [
  { value: "frame:ICRS", label: "ICRS" },
  { value: "frame:FK5/2000", label: "FK5, equinox J2000" },
  { value: "frame:galactic", label: "Galactic" },
];

/** Years over which the fastest star of the file is followed, for a feeling of what an epoch is worth. */
const YEARS = 16;

const J2000 = /J?2000/i;
const OTHER_YEAR = /\b(?:ep|epoch)\s*=?\s*J?(?:19|20)\d\d/i;

/** `J2000` in a name or as a bare equinox, where nothing says of what it is the date. */
const saysJ2000 = ({ sample }: Look, { shown, card }: UsedColumn): boolean => {
  const { frame, description } = shown.column;
  const said = frame ?? sample.meta.frame;
  if (julianYear(said?.epoch) !== null || OTHER_YEAR.test(description)) return false;
  return J2000.test(card.header) || (julianYear(said?.equinox) === 2000 && !/ICRS/i.test(said?.system ?? ""));
};

const farthest = (look: Look): string => {
  const motions = ["pmra", "pmdec"].flatMap((key) => columnOf(look, key) ?? []);
  const most = motions.reduce(
    (m, u) =>
      rowsWhere(u, (v) => !Number.isNaN(v)).reduce((n, row) => Math.max(n, Math.abs(u.values[row] ?? 0)), m),
    0,
  );
  const arcsec = (most * YEARS) / 1000;
  return arcsec >= 0.1
    ? ` and it has proper motions. Its fastest star would be misplaced by ${roughly(arcsec)}″ in ${YEARS} years`
    : ". A fast star would be misplaced by many arcseconds";
};

const epoch = (look: Look, ra: UsedColumn): Finding[] => {
  const { plan } = look;
  if (columnOf(look, "epoch") || plan.epoch !== null) return [];
  if (saysJ2000(look, ra) && !isAccepted(plan, "j2000-doubt"))
    return [
      ask(
        "j2000-doubt",
        "“J2000” can mean the axes of the positions or their date, and the file does not say which.",
        "Say what J2000 is here.",
        {
          answers: [
            { value: "axes:2000", label: "Axes only" },
            { value: "date:2000", label: "Date of the positions" },
            { value: "both:2000", label: "Both" },
          ],
        },
      ),
    ];
  return [
    ask(
      "epoch-missing",
      `This table does not say at which date its positions are true${farthest(look)}.`,
      "Enter the epoch as a year, for example 2016.0.",
    ),
  ];
};

const frame = ({ plan, sample }: Look, ra: UsedColumn): Finding[] => {
  const unread = unreadFrame(sample, ra.card);
  if (unread !== null && plan.frame === null)
    return [
      stop(
        "frame-unread",
        `The positions are said to be in ${unread}, which is not converted here.`,
        "Bring positions in ICRS, FK5 or galactic coordinates, or leave these columns unused.",
        { column: ra.card.header },
      ),
    ];
  if (plan.frame !== null) return [];
  return [
    ask(
      "frame-missing",
      "The file names a frame of its positions that is not understood.",
      "Say which frame they are in.",
      {
        column: ra.card.header,
        answers: FRAMES,
      },
    ),
  ];
};

/** Frame, equinox and epoch: three things, and none of them is supposed. */
export const frameFindings = (look: Look): Finding[] => {
  const ra = columnOf(look, "ra");
  if (!ra || !columnOf(look, "dec")) return [];
  return [...frame(look, ra), ...epoch(look, ra)];
};
