import { useQueries } from "@tanstack/react-query";
import { useState } from "react";
import { OVERSCAN } from "./use-row-window.ts";

/** Rows read at a time. */
const BLOCK_ROWS = 100;

interface Options<Row> {
  /** Names the result whose rows these are; another key, other rows. */
  queryKey: readonly unknown[];
  count: number;
  read: (offset: number, limit: number, signal: AbortSignal) => Promise<readonly Row[]>;
}

export interface Blocks<Row> {
  rowAt: (index: number) => Row | undefined;
  onRange: (first: number, last: number, focused: number) => void;
  isReading: boolean;
  /** The rows shown belong to the result before; those of this one are on their way. */
  isOld: boolean;
  error: Error | null;
}

const blockOf = (row: number): number => Math.floor(row / BLOCK_ROWS);

/** The blocks of the rows in the window and of the row that holds the focus, each once. */
const blocksOf = (first: number, last: number, focused: number, count: number): number[] => {
  if (count === 0) return [];
  const clamp = (row: number): number => Math.max(0, Math.min(count - 1, row));
  const [from, to] = [blockOf(clamp(first - OVERSCAN)), blockOf(clamp(last + OVERSCAN))];
  const wanted = new Set(Array.from({ length: to - from + 1 }, (_, i) => from + i));
  if (focused >= 0) wanted.add(blockOf(clamp(focused)));
  return [...wanted].sort((a, b) => a - b);
};

/** Reads the blocks of rows that are on screen; a block that was scrolled past before it came is given up. */
export const useBlocks = <Row>({ queryKey, count, read }: Options<Row>): Blocks<Row> => {
  const [range, setRange] = useState({ first: 0, last: 0, focused: -1 });
  const blocks = blocksOf(range.first, range.last, range.focused, count);
  const answers = useQueries({
    queries: blocks.map((block) => ({
      queryKey: [...queryKey, "block", block],
      queryFn: ({ signal }: { signal: AbortSignal }) => read(block * BLOCK_ROWS, BLOCK_ROWS, signal),
      staleTime: Number.POSITIVE_INFINITY,
      gcTime: 60_000,
      structuralSharing: false,
      // The same rows of the result before stay while the new ones are read, so that nothing flickers.
      placeholderData: (
        before: readonly Row[] | undefined,
        query: { queryKey: readonly unknown[] } | undefined,
      ) => (query?.queryKey.at(-1) === block ? before : undefined),
    })),
  });
  const at = new Map(blocks.map((block, i) => [block, answers[i]?.data]));
  const [onRange] = useState(() => (first: number, last: number, focused: number) => {
    setRange((now) =>
      now.first === first && now.last === last && now.focused === focused ? now : { first, last, focused },
    );
  });
  return {
    rowAt: (index) => at.get(blockOf(index))?.[index % BLOCK_ROWS],
    onRange,
    isReading: answers.some((answer) => answer.isFetching),
    isOld: answers.some((answer) => answer.isPlaceholderData),
    error: answers.find((answer) => answer.error)?.error ?? null,
  };
};
