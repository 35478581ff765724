const two = (n: number): string => String(n).padStart(2, "0");

/** 2027-03-04 09:15, in the reader's own zone. */
const local = (at: Date): string =>
  `${at.getFullYear()}-${two(at.getMonth() + 1)}-${two(at.getDate())} ${two(at.getHours())}:${two(at.getMinutes())}`;

/** A moment in UTC, with the reader's own time in brackets where it differs, or on hover where room is short. */
export const Moment = ({ at, isShort = false }: { at: string; isShort?: boolean }) => {
  const date = new Date(at);
  const utc = `${date.toISOString().slice(0, 16).replace("T", " ")} UTC`;
  const own = `${local(date)} local time`;
  return (
    <time dateTime={at} title={own} className="font-mono text-[13px] sm:whitespace-nowrap">
      {isShort || date.getTimezoneOffset() === 0 ? utc : `${utc} (${own})`}
    </time>
  );
};
