const unquoted = (token: string): string =>
  token.startsWith('"') ? token.replace(/^"|"$/g, "").replaceAll('""', '"') : token;

/** Values between blanks; several blanks count as one, and none inside quotes. */
export const tokensOf = (line: string): string[] => {
  const text = line.trim();
  if (text === "") return [];
  if (!text.includes('"')) return text.split(/\s+/);
  return (text.match(/"(?:[^"]|"")*"?|[^\s"]\S*/g) ?? []).map(unquoted);
};
