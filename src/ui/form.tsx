import { type FormEvent, type FormHTMLAttributes, type ReactNode, useEffect, useRef } from "react";
import { ApiError } from "#src/api/client.ts";
import { LevelMark } from "./level-mark.tsx";

const saysOf = (problem: unknown): { message: string; hint?: string | undefined } => {
  if (!(problem instanceof ApiError))
    return {
      message: "This could not be done: something in this page went wrong.",
      hint: "Load the page again. If it comes back, tell an administrator what you did.",
    };
  const many = Object.keys(problem.fields).length;
  // The server's own message for an unreadable request names the fields as programs do.
  if (problem.code === "unreadable-request" && problem.status !== 0 && many > 0)
    return { message: `${many === 1 ? "One field needs" : `${many} fields need`} another look.` };
  return { message: problem.message, hint: problem.hint };
};

/** What was refused and why, above the fields; takes the focus, and leads to each field. */
const Problem = ({ problem }: { problem: unknown }) => {
  const place = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (problem) place.current?.focus();
  }, [problem]);
  if (!problem) return null;
  const { message, hint } = saysOf(problem);
  const fields = problem instanceof ApiError ? Object.entries(problem.fields) : [];
  const focusOn = (name: string) => {
    const field = place.current?.closest("form")?.elements.namedItem(name);
    if (field instanceof HTMLElement) field.focus();
    else if (field instanceof RadioNodeList && field[0] instanceof HTMLElement) field[0].focus();
  };
  return (
    <div ref={place} role="alert" tabIndex={-1} className="rounded border border-mark bg-sheet p-3">
      <p className="font-medium">
        <LevelMark level="stop" /> {message}
      </p>
      {hint ? <p className="mt-1 text-soft">{hint}</p> : null}
      {fields.length === 0 ? null : (
        <ul className="mt-1">
          {fields.map(([name, text]) => (
            <li key={name}>
              <button
                type="button"
                onClick={() => focusOn(name)}
                className="min-h-6 text-left underline underline-offset-4"
              >
                {text}
              </button>
            </li>
          ))}
        </ul>
      )}
    </div>
  );
};

type Props = Omit<FormHTMLAttributes<HTMLFormElement>, "onSubmit"> & {
  form: { submit: (event: FormEvent) => void; problem: unknown };
  children: ReactNode;
};

/** A form that says itself what it refuses, in our words instead of the browser's. */
export const Form = ({ form, children, className = "", ...rest }: Props) => (
  <form noValidate onSubmit={form.submit} className={`flex flex-col gap-4 ${className}`} {...rest}>
    <Problem problem={form.problem} />
    {children}
  </form>
);
