import { queryOptions, useQueryClient } from "@tanstack/react-query";
import { useEffect } from "react";
import type { Job } from "#shared/api/jobs.ts";
import { get, request } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const isOver = (job: Job | undefined): boolean =>
  job !== undefined && job.state !== "queued" && job.state !== "running";

/** A job, read again each second until it ends; server-sent events only make it sooner. */
export const jobOptions = (programmeId: string, jobId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "job", jobId),
    queryFn: async () => (await get<{ job: Job }>(`/programmes/${programmeId}/jobs/${jobId}`)).job,
    refetchInterval: (query) => (isOver(query.state.data) ? false : 1000),
  });

export const activeJobsOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "jobs", "active"),
    queryFn: async () => (await get<{ jobs: Job[] }>(`/programmes/${programmeId}/jobs?active=true`)).jobs,
  });

export const useCancelJob = (programmeId: string) =>
  useProgrammeChange(programmeId, (jobId: string) =>
    request<{ job: Job }>("POST", `/programmes/${programmeId}/jobs/${jobId}/cancel`),
  );

/** Keeps a programme's queries fresh while its jobs go on, for those who may know of its jobs. */
export const useProgrammeEvents = (programmeId: string, mayListen: boolean): void => {
  const client = useQueryClient();
  useEffect(() => {
    if (!mayListen) return;
    const source = new EventSource(`/api/programmes/${programmeId}/events`);
    const refreshAll = () => void client.invalidateQueries({ queryKey: programmeKeys.all(programmeId) });
    source.addEventListener("job", (event) => {
      const job = JSON.parse((event as MessageEvent<string>).data) as Job;
      client.setQueryData(programmeKeys.part(programmeId, "job", job.id), job);
      if (isOver(job)) refreshAll();
    });
    source.addEventListener("changed", refreshAll);
    return () => source.close();
  }, [client, programmeId, mayListen]);
};
