import { Menu, MenuItem } from "#src/ui/menu.tsx";

export interface Choice {
  value: string | null;
  label: string;
}

interface Props {
  label: string;
  text: string;
  value: string | null;
  choices: readonly Choice[];
  onChoose: (value: string | null) => void;
}

/** An underlined part of the lede: reads as words, opens as a menu. */
export const Chooser = ({ label, text, value, choices, onChoose }: Props) => (
  <span className="inline-block">
    <Menu
      label={`${label}: ${text}`}
      align="left"
      trigger={text}
      triggerClassName="underline decoration-edge underline-offset-4 hover:decoration-ink"
    >
      <div className="font-sans text-sm">
        {choices.map((choice) => (
          <MenuItem
            key={choice.value ?? ""}
            isChecked={choice.value === value}
            onSelect={() => onChoose(choice.value)}
          >
            {choice.label}
          </MenuItem>
        ))}
      </div>
    </Menu>
  </span>
);
