const NAME_CHARACTERS = 200;

export interface UniqueNames {
  header: string[];
  renamed: { from: string; to: string }[];
}

/** Names that people can tell apart, without regard to case: `ra (2)`. What was changed about them is listed. */
export const uniqueNames = (cells: readonly string[]): UniqueNames => {
  const seen = new Set<string>();
  const renamed: UniqueNames["renamed"] = [];
  const header = cells.map((cell, index) => {
    const plain = cell.trim().replace(index === 0 ? /^#\s*/ : /^$/, "");
    const base = plain === "" ? `column ${index + 1}` : plain.slice(0, NAME_CHARACTERS);
    let name = base;
    for (let n = 2; seen.has(name.toLowerCase()); n++) name = `${base} (${n})`;
    seen.add(name.toLowerCase());
    if (name !== plain) renamed.push({ from: plain, to: name });
    return name;
  });
  return { header, renamed };
};
