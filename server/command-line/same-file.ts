import { stat } from "node:fs/promises";

/** Whether two paths lead to one file, also by a link; a path to nothing leads to no file. */
export const isSameFile = async (one: string, other: string): Promise<boolean> => {
  try {
    const [a, b] = await Promise.all([stat(one), stat(other)]);
    return a.dev === b.dev && a.ino === b.ino;
  } catch {
    return false;
  }
};
