import { useEffect, useRef, useState } from "react";
import type { Extract, ExtractPreview, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { putPlan, useCommitExtract, useKeepExtract } from "#src/api/extracts.ts";
import { openOf } from "./extract-words.ts";
import { suggestedColumns, suggestedPlan } from "./plan-answers.ts";

/** Quick successions of changes are kept as one. */
const SETTLE_MS = 500;

interface Shown {
  preview: ExtractPreview;
  findings: Finding[];
}

const hasSameColumns = (plan: ReadingPlan, preview: ExtractPreview): boolean =>
  plan.columns.length === preview.columns.length &&
  plan.columns.every((card, i) => card.header === preview.columns[i]?.header);

/** The reading plan as it is being answered: kept on the server after each change, one save after the other. */
export const usePlan = (programmeId: string, extract: Extract, opened: ExtractPreview) => {
  const keep = useKeepExtract(programmeId);
  const commit = useCommitExtract(programmeId, extract.id);
  const [plan, setPlan] = useState<ReadingPlan>(extract.plan ?? suggestedPlan(opened));
  const [shown, setShown] = useState<Shown>({ preview: opened, findings: opened.findings });
  const [isSaving, setSaving] = useState(false);
  const [isKept, setKept] = useState(extract.plan !== null);
  const [error, setError] = useState<unknown>(null);
  const version = useRef(extract.version);
  const wanted = useRef<ReadingPlan | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const inFlight = useRef<Promise<Finding[]>>(undefined);

  const saveAll = async (): Promise<Finding[]> => {
    let findings = shown.findings;
    while (wanted.current) {
      const next = wanted.current;
      wanted.current = null;
      const answer = await putPlan(programmeId, extract.id, { plan: next, version: version.current });
      version.current = answer.extract.version;
      findings = answer.findings;
      const preview = answer.preview ?? shown.preview;
      setShown({ preview, findings });
      keep(answer);
      // Another delimiter or encoding makes other columns: what the file suggests now is taken.
      if (!hasSameColumns(next, preview) && !wanted.current) {
        wanted.current = { ...next, columns: suggestedColumns(preview) };
        setPlan(wanted.current);
      }
    }
    return findings;
  };

  const flush = (): Promise<Finding[]> => {
    clearTimeout(timer.current);
    if (inFlight.current) return inFlight.current;
    if (!wanted.current) return Promise.resolve(shown.findings);
    setSaving(true);
    const saving = saveAll().finally(() => {
      inFlight.current = undefined;
      setSaving(false);
    });
    inFlight.current = saving;
    return saving.then((findings) => {
      setError(null);
      setKept(true);
      return findings;
    });
  };

  const flushNow = useRef(flush);
  flushNow.current = flush;
  // Who leaves within the half second after an answer has still given it.
  useEffect(() => () => void flushNow.current().catch(() => undefined), []);

  const change = (next: ReadingPlan): void => {
    setPlan(next);
    wanted.current = next;
    clearTimeout(timer.current);
    timer.current = setTimeout(() => void flushNow.current().catch(setError), SETTLE_MS);
  };

  const check = (): void => {
    wanted.current = plan;
    void flush().catch(setError);
  };

  const commitPlan = async (): Promise<void> => {
    try {
      if (!isKept || error) wanted.current = plan;
      const findings = await flush();
      if (openOf(findings).length === 0) await commit.mutateAsync(version.current);
    } catch (problem) {
      setError(problem);
    }
  };

  return {
    plan,
    ...shown,
    isSaving,
    isKept,
    error,
    isCommitting: commit.isPending,
    change,
    check,
    commit: () => void commitPlan(),
  };
};
