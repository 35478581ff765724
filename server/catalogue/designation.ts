/** One spelling for matching: `BD+23_3912`, `BD +23 3912` and `bd+23 3912` name one star; component letters stay. */
export const normaliseDesignation = (text: string): string => text.replace(/[\s_]+/g, "").toUpperCase();

/** The same in SQL, for a column that the caller names. */
export const normalisedSql = (column: string): string =>
  `UPPER(REGEXP_REPLACE(${column}, '[[:space:]_]+', ''))`;
