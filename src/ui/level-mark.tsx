export type Level = "stop" | "ask" | "note";

const SHAPES: Record<Level, { shape: string; word: string; color: string }> = {
  stop: { shape: "⬣", word: "Stop", color: "text-mark" },
  ask: { shape: "◆", word: "Ask", color: "text-mark" },
  note: { shape: "●", word: "Note", color: "text-soft" },
};

/** The level of a finding as a shape and, where there is room, a word: never by colour alone. */
export const LevelMark = ({ level, hasWord = false }: { level: Level; hasWord?: boolean }) => {
  const { shape, word, color } = SHAPES[level];
  return (
    <span className={`${color} text-xs font-semibold tracking-wider`}>
      <span aria-hidden="true">{shape}</span>{" "}
      {hasWord ? word.toUpperCase() : <span className="sr-only">{word}:</span>}
    </span>
  );
};
