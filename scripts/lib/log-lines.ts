/** Makes a log line readable in a terminal: `12:30:05 web  Answering at …`. What is no log line is kept as it is. */
export const readableLine = (service: string, line: string): string => {
  const entry = parse(line);
  if (!entry) return `${service.padEnd(6)} ${line}`;
  const { time, level, msg, category, service: _, ...more } = entry;
  const at = typeof time === "string" ? time.slice(11, 19) : "";
  const loud = Number(level) >= 50 ? "ERROR " : Number(level) >= 40 ? "warning " : "";
  const rest = Object.keys(more).length > 0 ? ` ${JSON.stringify(more)}` : "";
  return `${at} ${service.padEnd(6)} ${loud}${String(msg ?? category ?? "")}${rest}`;
};

const parse = (line: string): Record<string, unknown> | null => {
  if (!line.startsWith("{")) return null;
  try {
    return JSON.parse(line) as Record<string, unknown>;
  } catch {
    return null;
  }
};

/** Cuts a stream of text into lines. */
export const lineReader = (onLine: (line: string) => void) => {
  let rest = "";
  return (chunk: Buffer): void => {
    const lines = (rest + chunk.toString("utf8")).split("\n");
    rest = lines.pop() ?? "";
    for (const line of lines) if (line.trim() !== "") onLine(line);
  };
};
