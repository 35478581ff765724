import { ApiError } from "#src/api/client.ts";
import { Button } from "./button.tsx";
import { LevelMark } from "./level-mark.tsx";

interface Props {
  error: unknown;
  onRetry?: () => void;
  /** Stands alone on a page instead of beside a control. */
  isPage?: boolean;
}

const says = (error: unknown): { message: string; hint?: string | undefined } =>
  error instanceof ApiError
    ? { message: error.message, hint: error.hint }
    : {
        message: "This screen could not be shown: something in it went wrong.",
        hint: "Load the page again. If it comes back, tell an administrator what you did.",
      };

/** A failure in words: what, why, what to do. Takes the reader's attention when it appears. */
export const ErrorNotice = ({ error, onRetry, isPage = false }: Props) => {
  if (!error) return null;
  const { message, hint } = says(error);
  return (
    <div role="alert" className={isPage ? "mx-auto max-w-xl p-8" : "rounded border border-mark bg-sheet p-3"}>
      <p className={isPage ? "font-serif text-2xl" : "font-medium"}>
        <LevelMark level="stop" /> {message}
      </p>
      {hint ? <p className="mt-1 text-soft">{hint}</p> : null}
      {onRetry ? (
        <Button className="mt-3" onClick={onRetry}>
          Try again
        </Button>
      ) : null}
    </div>
  );
};
