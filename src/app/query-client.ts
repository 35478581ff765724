import { QueryClient } from "@tanstack/react-query";
import { ApiError } from "#src/api/client.ts";

/** How often a table that is being prepared is asked for again. */
const PREPARING_RETRY_MS = 1000;
const PREPARING_TRIES = 120;

/** A refusal stays a refusal; only a table that is being prepared, or a server out of reach, is asked again. */
const shouldRetry = (failures: number, error: Error): boolean => {
  if (!(error instanceof ApiError)) return false;
  if (error.code === "scan-index-building") return failures < PREPARING_TRIES;
  return (error.status === 0 || error.status === 502) && failures < 2;
};

export const createQueryClient = (): QueryClient =>
  new QueryClient({
    defaultOptions: {
      queries: {
        retry: shouldRetry,
        retryDelay: PREPARING_RETRY_MS,
        refetchOnWindowFocus: false,
        staleTime: 10_000,
      },
      mutations: { retry: false },
    },
  });
