/** Something the person who started the command can put right: printed as it is, without a stack. */
export class Trouble extends Error {
  constructor(message: string, cause?: unknown) {
    super(message, { cause });
    this.name = "Trouble";
  }
}

/** Error code of the system or of the database driver; empty when there is none. */
export const codeOf = (error: unknown): string =>
  error instanceof Error && "code" in error && typeof error.code === "string" ? error.code : "";

/** What to print for an error that ends the command. */
export const describeTrouble = (error: unknown): string => {
  if (error instanceof Trouble) return error.message;
  if (error instanceof Error && error.name === "ConfigError") return error.message;
  if (codeOf(error) === "EACCES" || codeOf(error) === "EPERM" || codeOf(error) === "EROFS")
    return `A right is missing: ${messageOf(error)}. Run the command as the owner of this folder, or give that right.`;
  if (codeOf(error) === "ENOSPC")
    return `The disk is full: ${messageOf(error)}. Make room and run the command again.`;
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
};

const messageOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));
