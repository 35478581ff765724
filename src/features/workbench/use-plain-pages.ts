import { useCallback, useState } from "react";

const KEY = "shortlight-plain-pages";

const remembered = (): boolean => {
  try {
    return localStorage.getItem(KEY) === "yes";
  } catch {
    return false;
  }
};

/** Whether the table stands as native pages instead of a grid; the browser remembers the choice. */
export const usePlainPages = (): [isPlain: boolean, setPlain: (isPlain: boolean) => void] => {
  const [isPlain, setState] = useState(remembered);
  const setPlain = useCallback((next: boolean) => {
    setState(next);
    try {
      localStorage.setItem(KEY, next ? "yes" : "no");
    } catch {
      // A browser that keeps nothing shows the grid again next time.
    }
  }, []);
  return [isPlain, setPlain];
};
