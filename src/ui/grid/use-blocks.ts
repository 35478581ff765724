import { useQueries } from "@tanstack/react-query";
import { useState } from "react";

/** Rows read at a time. */
export const BLOCK_ROWS = 100;

interface Options<Row> {
  /** Names the result whose rows these are; another key, other rows. */
  queryKey: readonly unknown[];
  count: number;
  read: (offset: number, limit: number, signal: AbortSignal) => Promise<readonly Row[]>;
}

export interface Blocks<Row> {
  rowAt: (index: number) => Row | undefined;
  onRange: (first: number, last: number) => void;
  isReading: boolean;
  error: Error | null;
}

/** Reads the blocks of rows that are on screen; a block that was scrolled past before it came is given up. */
export const useBlocks = <Row>({ queryKey, count, read }: Options<Row>): Blocks<Row> => {
  const [range, setRange] = useState({ first: 0, last: 0 });
  const firstBlock = Math.floor(Math.min(range.first, Math.max(0, count - 1)) / BLOCK_ROWS);
  const lastBlock = Math.floor(Math.min(range.last, Math.max(0, count - 1)) / BLOCK_ROWS);
  const blocks =
    count === 0 ? [] : Array.from({ length: lastBlock - firstBlock + 1 }, (_, i) => firstBlock + i);
  const answers = useQueries({
    queries: blocks.map((block) => ({
      queryKey: [...queryKey, "block", block],
      queryFn: ({ signal }: { signal: AbortSignal }) => read(block * BLOCK_ROWS, BLOCK_ROWS, signal),
      staleTime: Number.POSITIVE_INFINITY,
      gcTime: 60_000,
      structuralSharing: false,
    })),
  });
  const [onRange] = useState(() => (first: number, last: number) => {
    setRange((now) => (now.first === first && now.last === last ? now : { first, last }));
  });
  return {
    rowAt: (index) => answers[Math.floor(index / BLOCK_ROWS) - firstBlock]?.data?.[index % BLOCK_ROWS],
    onRange,
    isReading: answers.some((answer) => answer.isFetching),
    error: answers.find((answer) => answer.error)?.error ?? null,
  };
};
