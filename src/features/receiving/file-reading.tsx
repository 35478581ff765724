import type { ReadingPlan } from "#shared/api/extracts.ts";
import { Select, TextInput } from "#src/ui/inputs.tsx";
import { DECIMAL_MARKS, DELIMITERS, ENCODINGS, hasDelimiter, hasEncoding } from "./extract-words.ts";
import { YearField } from "./year-field.tsx";

interface Props {
  plan: ReadingPlan;
  isReadOnly: boolean;
  onPlan: (plan: ReadingPlan) => void;
}

const entries = <K extends string>(words: Readonly<Record<K, string>>): [K, string][] =>
  Object.entries(words) as [K, string][];

/** How the text of the file is cut into cells, where its format leaves that open. */
const Cells = ({ plan, isReadOnly, onPlan }: Props) => {
  const choice = <K extends "delimiter" | "encoding" | "decimalMark">(
    label: string,
    key: K,
    words: Readonly<Record<ReadingPlan[K], string>>,
  ) => (
    <Select
      label={label}
      value={plan[key]}
      disabled={isReadOnly}
      onChange={(event) => onPlan({ ...plan, [key]: event.target.value })}
    >
      {entries(words).map(([value, word]) => (
        <option key={value} value={value}>
          {word}
        </option>
      ))}
    </Select>
  );
  return (
    <>
      {hasDelimiter(plan.format) ? choice("Values separated by", "delimiter", DELIMITERS) : null}
      {hasDelimiter(plan.format) ? choice("Decimal mark", "decimalMark", DECIMAL_MARKS) : null}
      {hasEncoding(plan.format) ? choice("Encoding", "encoding", ENCODINGS) : null}
    </>
  );
};

const FRAMES: Readonly<Record<NonNullable<ReadingPlan["frame"]>, string>> = {
  ICRS: "ICRS",
  FK5: "FK5, equatorial of an equinox",
  galactic: "galactic",
};
const RA_UNITS: Readonly<Record<NonNullable<ReadingPlan["raUnit"]>, string>> = {
  deg: "degrees",
  hour: "hours",
};

/** Frame, equinox and epoch of the positions: three things, each its own field. */
const Positions = ({ plan, isReadOnly, onPlan }: Props) => {
  const hasEpochColumn = plan.columns.some((c) => c.means === "epoch");
  return (
    <>
      <Select
        label="Frame of the positions"
        value={plan.frame ?? ""}
        disabled={isReadOnly}
        onChange={(event) => {
          const frame = (event.target.value || null) as ReadingPlan["frame"];
          onPlan({ ...plan, frame, equinox: frame === "FK5" ? (plan.equinox ?? 2000) : null });
        }}
      >
        {plan.frame === null ? <option value="">not answered</option> : null}
        {entries(FRAMES).map(([value, word]) => (
          <option key={value} value={value}>
            {word}
          </option>
        ))}
      </Select>
      {plan.frame === "FK5" ? (
        <YearField
          label="Equinox of the axes"
          value={plan.equinox}
          isReadOnly={isReadOnly}
          onValue={(equinox) => onPlan({ ...plan, equinox })}
        />
      ) : null}
      <YearField
        label="Epoch of the positions"
        value={plan.epoch}
        isReadOnly={isReadOnly}
        placeholder={hasEpochColumn ? "in its column" : "not answered"}
        onValue={(epoch) => onPlan({ ...plan, epoch })}
      />
      <Select
        label="Right ascension in"
        value={plan.raUnit ?? ""}
        disabled={isReadOnly}
        onChange={(event) =>
          onPlan({ ...plan, raUnit: (event.target.value || null) as ReadingPlan["raUnit"] })
        }
      >
        <option value="">as its unit says</option>
        {entries(RA_UNITS).map(([value, word]) => (
          <option key={value} value={value}>
            {word}
          </option>
        ))}
      </Select>
    </>
  );
};

/** How the file is read as a whole: its cells, its positions, and to which release its identifiers belong. */
export const FileReading = (props: Props) => {
  const { plan, isReadOnly, onPlan } = props;
  const hasPositions = plan.columns.some((c) => c.means === "ra" || c.means === "dec");
  return (
    <div className="mb-5 grid grid-cols-1 gap-3 sm:grid-cols-2 2xl:grid-cols-4">
      <Cells {...props} />
      <TextInput
        label="Release of the identifiers"
        placeholder="as the catalogue names it"
        maxLength={80}
        autoComplete="off"
        value={plan.release}
        disabled={isReadOnly}
        onChange={(event) => onPlan({ ...plan, release: event.target.value })}
      />
      {hasPositions ? <Positions {...props} /> : null}
    </div>
  );
};
