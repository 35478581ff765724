import { type FormEvent, useState } from "react";
import type { z } from "zod";
import { ApiError } from "#src/api/client.ts";

type Messages = Readonly<Record<string, string>>;

interface Parts<V, B> {
  /** The contract's own schema: the same rules, in the same words, as the server's. */
  schema: z.ZodType<B>;
  initial: V;
  send: (body: B) => Promise<unknown>;
}

export interface FormState<V> {
  values: V;
  /** What was wrong with a field is forgotten once the field changes. */
  set: (change: Partial<V> | ((now: V) => Partial<V>)) => void;
  /** What is wrong with a field, in words, by its name. */
  fields: Messages;
  /** The last refusal as a whole; a new object with each, so that it can be told from the one before. */
  problem: unknown;
  isBusy: boolean;
  /** Takes the refusal off the screen, once it was dealt with. */
  forget: () => void;
  submit: (event?: FormEvent) => void;
}

const messagesOf = (error: z.ZodError): Messages => {
  const fields: Record<string, string> = {};
  for (const issue of error.issues) fields[issue.path.join(".")] ??= issue.message;
  return fields;
};

const notReady = (fields: Messages): ApiError => {
  const many = Object.keys(fields).length;
  return new ApiError(0, {
    code: "unreadable-request",
    message: `${many === 1 ? "One field needs" : `${many} fields need`} another look, so nothing was sent yet.`,
    fields,
  });
};

/** The messages beside fields that are as they were when they were refused. */
const stillWrong = <V extends object>(problem: unknown, refused: V, values: V): Messages => {
  if (!(problem instanceof ApiError)) return {};
  const isAsRefused = ([name]: [string, string]) => {
    const key = name.split(".")[0] as keyof V;
    return refused[key] === values[key];
  };
  return Object.fromEntries(Object.entries(problem.fields).filter(isAsRefused));
};

/** Keeps what is typed, checks it, sends it once, and keeps what was refused and why. */
export const useForm = <V extends object, B>({ schema, initial, send }: Parts<V, B>): FormState<V> => {
  const [values, setValues] = useState(initial);
  const [problem, setProblem] = useState<unknown>(null);
  const [refused, setRefused] = useState(initial);
  const [isBusy, setBusy] = useState(false);
  const attempt = async () => {
    setRefused(values);
    const parsed = schema.safeParse(values);
    if (!parsed.success) return setProblem(notReady(messagesOf(parsed.error)));
    setBusy(true);
    try {
      await send(parsed.data);
      setProblem(null);
    } catch (error) {
      setProblem(error);
    } finally {
      setBusy(false);
    }
  };
  return {
    values,
    set: (change) =>
      setValues((now) => ({ ...now, ...(typeof change === "function" ? change(now) : change) })),
    fields: stillWrong(problem, refused, values),
    problem,
    isBusy,
    forget: () => setProblem(null),
    submit: (event) => {
      event?.preventDefault();
      if (!isBusy) void attempt();
    },
  };
};
