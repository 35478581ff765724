/** Characters that a column takes, from 0; `to` is the first after it. */
export interface Field {
  readonly from: number;
  readonly to: number;
}

const isBlank = (line: string, at: number): boolean => {
  const code = line.charCodeAt(at);
  return Number.isNaN(code) || code === 32 || code === 9;
};

/**
 * Cuts lines into cells by the gaps between columns. A value may reach into a gap that it leaves a blank of; a line
 * whose text goes across a gap, or stands in the middle of one, is not cut at all.
 */
export class Cutter {
  /** @param isEndFree whether the last column goes on to the end of the line, with blanks in it */
  constructor(
    readonly fields: readonly Field[],
    private readonly isEndFree = true,
  ) {}

  /** The cells of a line, or the number, from 0, of the gap that is none in it. */
  cut(line: string): string[] | number {
    const { fields } = this;
    const cells: string[] = [];
    let begin = 0;
    for (let i = 0; i + 1 < fields.length; i++) {
      const end = this.endInGap(line, i);
      if (end < 0) return i;
      cells.push(line.slice(begin, end).trim());
      begin = end;
    }
    const last = line.slice(begin).trim();
    if (!this.isEndFree && this.goesBeyond(line)) return fields.length - 1;
    cells.push(last);
    return cells;
  }

  /** Whether text stands apart from the last column, behind it. */
  private goesBeyond(line: string): boolean {
    const end = this.fields.at(-1)?.to ?? 0;
    return line.length > end && /\s\S/.test(line.slice(Math.max(0, end - 1)));
  }

  /** Where the column before a gap ends in this line; −1 where the gap is none. */
  private endInGap(line: string, gap: number): number {
    const from = this.fields[gap]?.to ?? 0;
    const to = this.fields[gap + 1]?.from ?? 0;
    let left = from;
    if (from > 0 && !isBlank(line, from - 1)) while (left < to && !isBlank(line, left)) left++;
    let right = to;
    if (!isBlank(line, to)) while (right > left && !isBlank(line, right - 1)) right--;
    if (left >= right) return -1;
    for (let at = left; at < right; at++) if (!isBlank(line, at)) return -1;
    return left;
  }
}
