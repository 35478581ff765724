import { type InputHTMLAttributes, type ReactNode, useState } from "react";
import { Field } from "./field.tsx";

interface Props extends InputHTMLAttributes<HTMLInputElement> {
  label: string;
  hint?: ReactNode;
  error?: string | undefined;
}

/** A password that can be looked at while it is typed; password managers and pasting work. */
export const PasswordInput = ({ label, hint, error, ...input }: Props) => {
  const [isShown, setShown] = useState(false);
  return (
    <Field label={label} hint={hint} error={error}>
      {(ids) => (
        <>
          <input
            {...ids}
            {...input}
            type={isShown ? "text" : "password"}
            autoCapitalize="none"
            spellCheck={false}
            className="min-h-8 w-full min-w-0 rounded border border-edge bg-sheet px-2.5 py-1 text-ink aria-invalid:border-mark"
          />
          <button
            type="button"
            aria-pressed={isShown}
            aria-label={`Show ${label.toLowerCase()}`}
            onClick={() => setShown(!isShown)}
            className="min-h-8 flex-none px-1 text-[13px] text-soft underline decoration-edge underline-offset-4 hover:text-ink"
          >
            {isShown ? "Hide" : "Show"}
          </button>
        </>
      )}
    </Field>
  );
};
