import type { InputHTMLAttributes, ReactNode, SelectHTMLAttributes, TextareaHTMLAttributes } from "react";
import { Field } from "./field.tsx";

const BOX = "min-h-8 rounded border border-edge bg-sheet px-2.5 py-1 text-ink aria-invalid:border-mark";

interface Common {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  unit?: string;
  isInline?: boolean;
}

type TextProps = Common & InputHTMLAttributes<HTMLInputElement> & { isNumber?: boolean };

/** One line of text, or with `isNumber` a figure set in the figures' face and to the right. */
export const TextInput = ({
  label,
  hint,
  error,
  unit,
  isInline,
  isNumber = false,
  className = "",
  ...input
}: TextProps) => (
  <Field label={label} hint={hint} error={error} unit={unit} isInline={isInline}>
    {(ids) => (
      <input
        {...ids}
        {...input}
        inputMode={isNumber ? "decimal" : input.inputMode}
        className={`${BOX} ${isNumber ? "w-24 text-right font-mono" : "w-full"} ${className}`}
      />
    )}
  </Field>
);

type AreaProps = Common & TextareaHTMLAttributes<HTMLTextAreaElement>;

export const TextArea = ({ label, hint, error, className = "", ...area }: AreaProps) => (
  <Field label={label} hint={hint} error={error}>
    {(ids) => <textarea rows={3} {...ids} {...area} className={`${BOX} w-full ${className}`} />}
  </Field>
);

type SelectProps = Common & SelectHTMLAttributes<HTMLSelectElement>;

export const Select = ({
  label,
  hint,
  error,
  unit,
  isInline,
  className = "",
  children,
  ...select
}: SelectProps) => (
  <Field label={label} hint={hint} error={error} unit={unit} isInline={isInline}>
    {(ids) => (
      <select {...ids} {...select} className={`${BOX} ${isInline ? "" : "w-full"} ${className}`}>
        {children}
      </select>
    )}
  </Field>
);

type CheckProps = { label: ReactNode } & InputHTMLAttributes<HTMLInputElement>;

export const Checkbox = ({ label, ...input }: CheckProps) => (
  <label className="flex min-h-6 items-center gap-2">
    <input type="checkbox" {...input} className="size-4" />
    <span>{label}</span>
  </label>
);
