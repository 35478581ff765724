import { Button } from "#src/ui/button.tsx";
import { LedgerTable } from "#src/ui/ledger-table.tsx";

interface About {
  name: string;
  description: string;
}

interface Props {
  theirs: About;
  yours: About;
  onTheirs: () => void;
  onYours: () => void;
}

/** Both versions side by side, and the choice between them; nothing is merged by itself. */
export const ChangedMeanwhile = ({ theirs, yours, onTheirs, onYours }: Props) => (
  <div className="flex flex-col gap-3">
    <LedgerTable
      caption="What is saved now, and what you typed"
      heads={[{ label: "" }, { label: "Saved now" }, { label: "Yours" }]}
    >
      {(["name", "description"] as const).map((part) => (
        <tr key={part}>
          <th scope="row" className="border-b border-hair px-2 py-2 font-normal text-soft">
            {part === "name" ? "Name" : "Description"}
          </th>
          <td className="wrap-anywhere">{theirs[part] || "(blank)"}</td>
          <td className="wrap-anywhere">{yours[part] || "(blank)"}</td>
        </tr>
      ))}
    </LedgerTable>
    <div className="flex flex-wrap gap-2">
      <Button onClick={onTheirs}>Take what is saved</Button>
      <Button onClick={onYours}>Go on with yours</Button>
    </div>
  </div>
);
