import { setTimeout as wait } from "node:timers/promises";
import type { Response } from "express";
import type { Deps } from "../deps.ts";
import { presentJob } from "./present.ts";
import { jobsOf, recentlyChanged } from "./queries.ts";

const POLL_MS = 1_000;
const OVERLAP_SECONDS = 10;
const HEARTBEAT_TICKS = 15;
/** The browser connects again by itself, and then its rights are looked at anew. */
const LIFETIME_MS = 10 * 60_000;
const MOST_CHANGES = 100;

interface ChangedSubject {
  sequence: number;
  type: string;
  id: string;
}

const lastSequence = async (deps: Deps, programmeId: string): Promise<number> => {
  const [row] = await deps.db.query<{ sequence: number }[]>(
    "SELECT sequence FROM logbook_chain WHERE programme_id = ?",
    [programmeId],
  );
  return row?.sequence ?? 0;
};

const changesSince = (deps: Deps, programmeId: string, sequence: number): Promise<ChangedSubject[]> =>
  deps.db.query(
    `SELECT sequence, subject_type AS type, subject_id AS id FROM logbook_line
     WHERE programme_id = ? AND sequence > ? ORDER BY sequence LIMIT ${MOST_CHANGES}`,
    [programmeId, sequence],
  );

/** Server-sent events of one programme, read from the database each second: any web process can serve them. */
export const streamEvents = async (deps: Deps, programmeId: string, res: Response): Promise<void> => {
  const closed = new AbortController();
  res.once("close", () => closed.abort());
  res.writeHead(200, {
    "Content-Type": "text/event-stream",
    "Cache-Control": "no-store",
    "X-Accel-Buffering": "no",
  });
  const send = (event: string, data: unknown): void => {
    res.write(`event: ${event}\ndata: ${JSON.stringify(data)}\n\n`);
  };
  res.write("retry: 2000\n\n");
  const sent = new Map<string, string>();
  const sendJobs = (rows: Awaited<ReturnType<typeof jobsOf>>): void => {
    for (const row of rows) {
      const job = presentJob(row);
      const text = JSON.stringify(job);
      if (sent.get(job.id) === text) continue;
      sent.set(job.id, text);
      send("job", job);
    }
  };

  let sequence = await lastSequence(deps, programmeId);
  sendJobs(await jobsOf(deps.db.manager, programmeId, true));
  const endsAt = Date.now() + LIFETIME_MS;
  for (let tick = 1; !closed.signal.aborted && Date.now() < endsAt; tick++) {
    await wait(POLL_MS, undefined, { signal: closed.signal }).catch(() => undefined);
    if (closed.signal.aborted) break;
    try {
      sendJobs(await recentlyChanged(deps.db.manager, programmeId, OVERLAP_SECONDS));
      const changes = await changesSince(deps, programmeId, sequence);
      for (const { type, id } of changes) send("changed", { subject: { type, id } });
      sequence = changes.at(-1)?.sequence ?? sequence;
    } catch (error) {
      // Ending the stream makes the browser connect anew once the database answers again.
      deps.log.warn("job", "Events stopped because the database did not answer", { error });
      break;
    }
    if (tick % HEARTBEAT_TICKS === 0) res.write(": still here\n\n");
  }
  res.end();
};
