import { defaultRangeExtractor, type Range, useVirtualizer, type Virtualizer } from "@tanstack/react-virtual";
import { type RefObject, useCallback, useEffect, useRef } from "react";
import { scrollScale } from "./scroll-scale.ts";

/** Rows that one notch of a wheel moves on a scaled track. */
const ROWS_PER_NOTCH = 3;
const NOTCH_PX = 100;
/** Rows kept ready above and below the window. */
export const OVERSCAN = 12;

interface Options {
  rows: number;
  rowHeight: number;
  /** Height of what stands fixed above the rows. */
  headHeight: number;
  scroller: RefObject<HTMLDivElement | null>;
  /** Row that holds the focus: it stays mounted wherever the window goes. */
  focusedRow: number;
}

export interface RowWindow {
  virtualizer: Virtualizer<HTMLDivElement, Element>;
  /** Height of the scrolling track, px. */
  track: number;
  /** Where to draw a row that starts at that offset of the rows, px on the track. */
  place: (start: number) => number;
  /** Shows the first row. */
  toTop: () => void;
  /** First and last row that can be seen, at least in part. */
  visible: { first: number; last: number };
}

/** Which rows are on screen, for any number of rows. */
export const useRowWindow = ({ rows, rowHeight, headHeight, scroller, focusedRow }: Options): RowWindow => {
  // Read by listeners that outlive a render.
  const scale = useRef({ track: 0, factor: 1 });
  /** Offset in rows' pixels and the scrollbar's place it was set at: keeps what rounding on the track would lose. */
  const exact = useRef({ offset: 0, scrollTop: 0 });
  scale.current = scrollScale(
    rows * rowHeight,
    Math.max(rowHeight, (scroller.current?.clientHeight ?? 600) - headHeight),
  );

  const offsetNow = useCallback((element: HTMLElement): number => {
    const { factor } = scale.current;
    if (factor === 1) return element.scrollTop;
    const isOurs = Math.abs(element.scrollTop - exact.current.scrollTop) <= 1;
    return isOurs ? exact.current.offset : element.scrollTop * factor;
  }, []);

  const goTo = useCallback((element: HTMLElement, offset: number): void => {
    const { factor } = scale.current;
    const scrollTop = offset / factor;
    element.scrollTop = scrollTop;
    exact.current = { offset, scrollTop: element.scrollTop };
  }, []);

  const virtualizer = useVirtualizer<HTMLDivElement, Element>({
    count: rows,
    getScrollElement: () => scroller.current,
    estimateSize: () => rowHeight,
    overscan: OVERSCAN,
    scrollPaddingStart: 0,
    scrollPaddingEnd: headHeight,
    rangeExtractor: useCallback(
      (range: Range) => {
        const shown = defaultRangeExtractor(range);
        if (focusedRow < 0 || focusedRow >= rows || shown.includes(focusedRow)) return shown;
        return [...shown, focusedRow].sort((a, b) => a - b);
      },
      [focusedRow, rows],
    ),
    observeElementOffset: useCallback(
      (
        instance: Virtualizer<HTMLDivElement, Element>,
        notify: (offset: number, isScrolling: boolean) => void,
      ) => {
        const element = instance.scrollElement;
        if (!element) return undefined;
        const onScroll = () => {
          const offset = offsetNow(element);
          exact.current = { offset, scrollTop: element.scrollTop };
          notify(offset, false);
        };
        onScroll();
        element.addEventListener("scroll", onScroll, { passive: true });
        return () => element.removeEventListener("scroll", onScroll);
      },
      [offsetNow],
    ),
    scrollToFn: useCallback(
      (offset: number, _options: unknown, instance: Virtualizer<HTMLDivElement, Element>) => {
        if (instance.scrollElement) goTo(instance.scrollElement, offset);
      },
      [goTo],
    ),
  });

  // Rows of another height lie elsewhere; the library asks for heights once.
  // biome-ignore lint/correctness/useExhaustiveDependencies: the height is what changes them
  useEffect(() => virtualizer.measure(), [virtualizer, rowHeight]);

  useEffect(() => {
    const element = scroller.current;
    if (!element) return;
    const onWheel = (event: WheelEvent) => {
      const { factor } = scale.current;
      if (factor === 1 || event.deltaY === 0 || event.shiftKey || event.ctrlKey) return;
      event.preventDefault();
      const most = rows * rowHeight - (element.clientHeight - headHeight);
      const notches =
        event.deltaMode === WheelEvent.DOM_DELTA_PIXEL ? event.deltaY / NOTCH_PX : Math.sign(event.deltaY);
      const by = notches * ROWS_PER_NOTCH * rowHeight;
      goTo(element, Math.max(0, Math.min(most, offsetNow(element) + by)));
    };
    element.addEventListener("wheel", onWheel, { passive: false });
    return () => element.removeEventListener("wheel", onWheel);
  }, [scroller, rows, rowHeight, headHeight, goTo, offsetNow]);

  const toTop = useCallback(() => {
    if (scroller.current) goTo(scroller.current, 0);
  }, [scroller, goTo]);

  const place = (start: number): number => {
    const { factor } = scale.current;
    return factor === 1 ? start : start - exact.current.offset + exact.current.scrollTop;
  };
  const offset = virtualizer.scrollOffset ?? 0;
  const height = Math.max(rowHeight, (virtualizer.scrollRect?.height ?? 0) - headHeight);
  const lastRow = Math.max(0, rows - 1);
  const visible = {
    first: Math.min(lastRow, Math.floor(offset / rowHeight)),
    last: Math.min(lastRow, Math.ceil((offset + height) / rowHeight) - 1),
  };
  return { virtualizer, track: scale.current.track, place, toTop, visible };
};
