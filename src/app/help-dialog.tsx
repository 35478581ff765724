import { Dialog } from "#src/ui/dialog.tsx";

const KEYS: readonly (readonly [keys: string, what: string])[] = [
  ["/", "Find a star"],
  ["Shift + N", "Next theme"],
  ["?", "This help"],
  ["Esc", "Close the innermost thing"],
  ["Arrows, Home, End, Page Up, Page Down", "Move in the table"],
  ["Ctrl + Home, Ctrl + End", "First and last row"],
  ["Ctrl + G", "Go to a row"],
  ["Enter", "Open the star, or sort by the column"],
  ["M", "Workings of the value (in the table)"],
  ["D", "Degrees or sexagesimal (in the table)"],
];

export const HelpDialog = ({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) => (
  <Dialog title="Keys and conventions" isOpen={isOpen} onClose={onClose}>
    <dl className="grid grid-cols-[auto_1fr] gap-x-6 gap-y-1.5">
      {KEYS.map(([keys, what]) => (
        <div key={keys} className="contents">
          <dt className="font-mono text-[13px]">{keys}</dt>
          <dd className="text-soft">{what}</dd>
        </div>
      ))}
    </dl>
    <h3 className="mt-5 mb-1 font-semibold">How numbers are written</h3>
    <p className="text-soft">
      The three leading digits of the error decide: from 100 to 354 it shows two digits, from 355 to 949 one,
      above that it is rounded up and shows two; the value is cut at the same place. Without an error, at most
      four digits. Files carry every digit. A blank cell says why it is blank; blanks come last in every
      order.
    </p>
  </Dialog>
);
