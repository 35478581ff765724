/** Every maximum, used by forms, schemas, readers and pages alike. */
export const LIMITS = {
  /** Bytes of one uploaded file. */
  fileBytes: 2 * 1024 ** 3,
  /** Bytes of one piece of an upload: what is sent again at most after a broken connection. */
  pieceBytes: 8 * 1024 ** 2,
  /** Bytes of a file that describes another. */
  companionBytes: 8 * 1024 ** 2,
  /** Rows that are pasted instead of brought as a file. */
  pastedRows: 500,
  /** Days that an upload waits for the rest of its file. */
  unfinishedUploadDays: 7,
  /** Columns of one file. */
  fileColumns: 3000,
  /** Characters in one cell. */
  cellCharacters: 1_000_000,
  /** Refused rows kept as text; more are counted. */
  refusedRowsKept: 10_000,
  nameCharacters: 120,
  emailCharacters: 254,
  noteCharacters: 2_000,
  passwordCharacters: { least: 12, most: 200 },
  cuts: 40,
  expressionCharacters: 1_000,
  meritTerms: 20,
  /** Rows of one window of the table. */
  windowRows: 500,
  /** Stars in one target list. */
  listStars: 100_000,
  /** Stars that a map draws one by one; more are counted in cells. */
  skyPoints: 20_000,
  /** Sign-in attempts per address and account in the window below. */
  signInAttempts: 10,
  signInWindowMinutes: 15,
  invitationDays: 7,
  passwordResetHours: 1,
  sessionDays: 14,
} as const;
