import { useEffect, useState } from "react";
import { z } from "zod";
import { ApiError } from "#src/api/client.ts";

const details = z.object({ waitSeconds: z.number() });

const secondsOf = (problem: unknown): number => {
  if (!(problem instanceof ApiError) || problem.code !== "too-many-attempts") return 0;
  return details.safeParse(problem.details).data?.waitSeconds ?? 0;
};

/** Seconds until the server listens again after too many attempts; 0 when it does. */
export const useWait = (problem: unknown): number => {
  const [left, setLeft] = useState(0);
  useEffect(() => {
    const until = Date.now() + secondsOf(problem) * 1000;
    const look = () => setLeft(Math.max(0, Math.ceil((until - Date.now()) / 1000)));
    look();
    const timer = setInterval(look, 1000);
    return () => clearInterval(timer);
  }, [problem]);
  return left;
};

/** 14:05 */
export const asClock = (seconds: number): string =>
  `${Math.floor(seconds / 60)}:${String(seconds % 60).padStart(2, "0")}`;
