/** A line drawn between the parts of a description. */
export const isRuleLine = (line: string): boolean => /^\s*(?:-{20,}|={20,})\s*$/.test(line);
