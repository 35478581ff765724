/** What shared code uses of the web's own standards, common to browsers and Node; neither's types are loaded here. */
declare class URLSearchParams {
  constructor(init?: string | Record<string, string> | string[][]);
  append(name: string, value: string): void;
  delete(name: string): void;
  get(name: string): string | null;
  getAll(name: string): string[];
  has(name: string): boolean;
  set(name: string, value: string): void;
  toString(): string;
  [Symbol.iterator](): IterableIterator<[string, string]>;
}
