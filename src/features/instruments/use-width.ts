import { type RefObject, useEffect, useRef, useState } from "react";

/** Width of an element as it is laid out, px: pictures are drawn at their true size, so that their words stay readable. */
export const useWidth = (before: number): [RefObject<HTMLDivElement | null>, number] => {
  const place = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(before);
  useEffect(() => {
    const element = place.current;
    if (!element) return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry && entry.contentRect.width > 0) setWidth(Math.round(entry.contentRect.width));
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [place, width];
};
