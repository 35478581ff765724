import { useState } from "react";

const read = (key: string): string | null => {
  try {
    return localStorage.getItem(key);
  } catch {
    return null;
  }
};

/** One of a few choices of how the table looks; the browser remembers it. */
export const useRemembered = <T extends string>(
  key: string,
  choices: readonly [T, ...T[]],
): [chosen: T, choose: (choice: T) => void] => {
  const [chosen, setChosen] = useState<T>(() => choices.find((c) => c === read(key)) ?? choices[0]);
  const choose = (choice: T) => {
    setChosen(choice);
    try {
      localStorage.setItem(key, choice);
    } catch {
      // A browser that keeps nothing shows the first choice again next time.
    }
  };
  return [chosen, choose];
};
