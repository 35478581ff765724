/**
 * Browsers end an element at about 33.5 million pixels and lose odd pixels above 16.7 million. A longer table gets a
 * shorter track, and the scrollbar's place on it is mapped to a place in rows, so that every row can be reached.
 */
export const LONGEST_TRACK_PX = 8_000_000;

export interface ScrollScale {
  /** Height of the track, px. */
  readonly track: number;
  /** Rows' height per track's pixel; 1 where the table fits. */
  readonly factor: number;
}

/**
 * @param content height of all rows, px
 * @param view height of the window onto them, px
 */
export const scrollScale = (content: number, view: number): ScrollScale => {
  if (content <= LONGEST_TRACK_PX) return { track: content, factor: 1 };
  // Over what can be scrolled, not over the whole height, or the last rows could not be reached.
  return { track: LONGEST_TRACK_PX, factor: (content - view) / (LONGEST_TRACK_PX - view) };
};
