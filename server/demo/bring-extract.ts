import { createReadStream } from "node:fs";
import { stat } from "node:fs/promises";
import { basename } from "node:path";
import type { ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import type { Deps } from "../deps.ts";
import { commitExtract, createExtract, savePlan, showExtract } from "../extracts/service.ts";
import { storeOriginal } from "../extracts/upload.ts";
import { runNextJob } from "../jobs/runner.ts";
import { findJob } from "../jobs/service.ts";

interface Answers {
  name: string;
  origin: string;
  release: string;
  /** Julian year of the positions where the file does not give it. */
  epoch: number | null;
}

/** What a curator would answer: what was suggested, and every suspect for "no value" taken for one. */
const answer = (preview: ExtractPreview, { release, epoch }: Answers): ReadingPlan => {
  const marks = (header: string): string[] =>
    preview.findings.flatMap((finding) =>
      finding.column === header
        ? finding.answers.flatMap(({ value }) =>
            value.startsWith("blank:") ? [value.slice("blank:".length)] : [],
          )
        : [],
    );
  const { format, delimiter, encoding, decimalMark, columns } = preview;
  return {
    format,
    delimiter,
    encoding,
    decimalMark,
    columns: columns.map(({ index, header, means, unit, blankMarks }) => ({
      index,
      header,
      means,
      unit,
      blankMarks: [...new Set([...blankMarks, ...marks(header)])],
    })),
    epoch,
    release,
    raUnit: "deg",
    frame: "ICRS",
    equinox: null,
  };
};

/** Brings a file in through every stage a person's file goes through, and runs the import to its end. */
export const bringExtract = async (
  deps: Deps,
  programmeId: string,
  curator: { id: string; name: string },
  file: string,
  answers: Answers,
): Promise<void> => {
  const { size: bytes } = await stat(file);
  const { name, origin } = answers;
  const { id } = await createExtract(deps, programmeId, curator, {
    name,
    origin,
    bytes,
    fileName: basename(file),
  });
  await storeOriginal(deps, programmeId, curator, id, createReadStream(file));
  const { extract, preview } = await showExtract(deps, programmeId, id);
  if (!preview) throw new Error(`${file} has no preview.`);
  const planned = await savePlan(deps, programmeId, curator, id, {
    plan: answer(preview, answers),
    version: extract.version,
  });
  const { jobId } = await commitExtract(deps, programmeId, curator, id, planned.extract.version);
  while (await runNextJob(deps));
  const job = await findJob(deps, programmeId, jobId);
  if (job.state !== "done")
    throw new Error(`${file} could not be brought in: ${job.errorMessage ?? job.state}`);
};
