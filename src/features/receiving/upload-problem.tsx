import { Link } from "react-router-dom";
import { z } from "zod";
import { ApiError } from "#src/api/client.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";

const same = z.object({ extractId: z.string(), number: z.int() });

/** Why a file did not arrive; the same bytes again lead to the extract that has them. */
export const UploadProblem = ({ error }: { error: unknown }) => {
  const programmeId = useProgrammeId();
  const details =
    error instanceof ApiError && error.code === "extract-already-here"
      ? same.safeParse(error.details).data
      : undefined;
  if (!details || !(error instanceof ApiError)) return <ErrorNotice error={error} />;
  return (
    <div role="alert" className="rounded border border-edge bg-sheet p-3">
      <p className="font-medium">
        <LevelMark level="note" /> {error.message}
      </p>
      <p className="mt-1 text-soft">{error.hint}</p>
      <Link
        to={paths.programme.to(programmeId, "extracts", `/${details.extractId}`)}
        className="mt-2 inline-block min-h-6 underline underline-offset-4"
      >
        Open extract {details.number}
      </Link>
    </div>
  );
};
