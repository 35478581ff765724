import { type ReactNode, useId } from "react";

export interface FieldIds {
  id: string;
  "aria-describedby": string | undefined;
  "aria-invalid": true | undefined;
}

interface Props {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  unit?: string;
  /** Label beside the control instead of above it. */
  isInline?: boolean;
  children: (ids: FieldIds) => ReactNode;
}

/** A labelled control with its unit, its hint, and its error beside it in words. */
export const Field = ({ label, hint, error, unit, isInline = false, children }: Props) => {
  const id = useId();
  const describedBy =
    [hint ? `${id}-hint` : "", error ? `${id}-error` : ""].filter(Boolean).join(" ") || undefined;
  return (
    <div
      className={
        isInline ? "grid grid-cols-[1fr_auto] items-center gap-x-3 gap-y-0.5" : "flex flex-col gap-1"
      }
    >
      <label htmlFor={id} className={isInline ? "text-soft" : "font-medium"}>
        {label}
      </label>
      <div className="flex items-center gap-2">
        {children({ id, "aria-describedby": describedBy, "aria-invalid": error ? true : undefined })}
        {unit === undefined ? null : <span className="w-12 font-mono text-xs text-soft">{unit}</span>}
      </div>
      {hint ? (
        <p id={`${id}-hint`} className="col-span-full text-xs text-soft">
          {hint}
        </p>
      ) : null}
      {error ? (
        <p id={`${id}-error`} className="col-span-full text-xs text-mark">
          <span aria-hidden="true">◆ </span>
          {error}
        </p>
      ) : null}
    </div>
  );
};
