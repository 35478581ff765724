import type { DuckDBConnection } from "@duckdb/node-api";
import type { Histogram, LadderStep } from "#shared/api/stars.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { Parameters } from "#shared/expression/to-sql.ts";
import type { Deps } from "../deps.ts";
import { compileCuts, orderSql, passes, sourceSql, whereSql } from "./compile.ts";
import { readHistograms } from "./histograms.ts";
import { findIndex, type IndexFile } from "./index-file.ts";
import { readerOf, readIds } from "./reader.ts";
import { Remembered } from "./remembered.ts";
import { type ResolvedView, resolveView } from "./resolve.ts";
import { EMPTY_TALLY, readLadder, readTally, type Steps, type Tally } from "./tally.ts";

/** Orders kept in memory: 8 bytes a star. Longer ones are asked for window by window. */
const ORDER_BYTES = 20_000_000;
const MOST_ORDERED = 1_500_000;
/** A window that ends before this row is a short top list, cheaper to ask for than a whole order. */
const TOP_ROWS = 1_000;

class Memory {
  readonly tallies = new Remembered<Tally>({ entries: 100, weight: 100 }, () => 1);
  readonly ladders = new Remembered<Steps>({ entries: 100, weight: 100 }, () => 1);
  readonly orders = new Remembered<BigInt64Array>(
    { entries: 8, weight: ORDER_BYTES },
    (order) => order.byteLength,
  );
}
const memories = new WeakMap<Deps, Memory>();
const memoryOf = (deps: Deps): Memory => {
  const memory = memories.get(deps) ?? new Memory();
  memories.set(deps, memory);
  return memory;
};

/** The question a person asks of the catalogue, open for questions about its answer. */
export class OpenView {
  constructor(
    private readonly deps: Deps,
    readonly resolved: ResolvedView,
    /** Null while there is no catalogue: then there are no stars. */
    private readonly index: IndexFile | null,
  ) {}

  private async ask<T>(work: (connection: DuckDBConnection) => Promise<T>, none: T): Promise<T> {
    if (!this.index) return none;
    return readerOf(this.deps).use(this.index.path, this.index.identity, work);
  }

  private get setKey(): string {
    const cuts = this.resolved.view.cuts.map(({ expression, blanks }) => [expression, blanks]);
    return JSON.stringify([this.index?.path, this.index?.identity, cuts]);
  }

  private tally(): Promise<Tally> {
    if (!this.index) return Promise.resolve(EMPTY_TALLY);
    return memoryOf(this.deps).tallies.get(this.setKey, () =>
      this.ask((c) => readTally(c, this.resolved.view.cuts), EMPTY_TALLY),
    );
  }

  private steps(): Promise<Steps> {
    const { cuts } = this.resolved.view;
    if (!this.index) return readLadder(null, cuts, 0);
    return memoryOf(this.deps).ladders.get(this.setKey, async () => {
      const total = await this.total();
      return this.ask((c) => readLadder(c, cuts, total), []);
    });
  }

  async count(): Promise<number> {
    return (await this.tally()).count;
  }

  /** Stars of the whole edition. */
  async total(): Promise<number> {
    return (await this.tally()).total;
  }

  /** What each cut leaves, lets fall, would drop alone, and finds blank. */
  async ladder(): Promise<LadderStep[]> {
    const steps = await this.steps();
    return steps.map((step, i) => ({ ...step, label: this.resolved.view.cuts[i]?.label ?? "" }));
  }

  /** SHA-256 that names the set of stars, whatever their order; the same on any machine. */
  async setHash(): Promise<string> {
    return (await this.tally()).hash;
  }

  /** Eight characters of it for people: `7f3a-91c2`. */
  async fingerprint(): Promise<string> {
    const hash = await this.setHash();
    return `${hash.slice(0, 4)}-${hash.slice(4, 8)}`;
  }

  private parts(): { source: string; where: string; order: string; values: number[] } {
    const { view, merit } = this.resolved;
    const p = new Parameters();
    return {
      where: whereSql(compileCuts(view.cuts, p)),
      source: sourceSql(view.sort, merit?.terms ?? null, p),
      order: orderSql(view.sort),
      values: p.values,
    };
  }

  private async read(connection: DuckDBConnection, most: number, offset: number): Promise<BigInt64Array> {
    const { source, where, order, values } = this.parts();
    const result = await connection.stream(
      `SELECT star_id FROM ${source} WHERE ${where} ORDER BY ${order} LIMIT ${most} OFFSET ${offset}`,
      values,
    );
    return readIds(result, most);
  }

  private order(count: number): Promise<BigInt64Array> {
    const { sort } = this.resolved.view;
    const key = JSON.stringify([
      this.setKey,
      sort,
      sort.key === "merit" ? this.resolved.merit?.versionId : null,
    ]);
    return memoryOf(this.deps).orders.get(key, () =>
      this.ask((c) => this.read(c, count, 0), new BigInt64Array()),
    );
  }

  /** Ids of the stars from that place (from 0) on, in the view's order. */
  async ids(offset: number, limit: number): Promise<string[]> {
    const count = await this.count();
    const from = Math.min(offset, count);
    const most = Math.min(limit, count - from);
    if (most <= 0) return [];
    const isTop = from + most <= TOP_ROWS && count > TOP_ROWS;
    const window =
      isTop || count > MOST_ORDERED
        ? await this.ask((c) => this.read(c, most, from), new BigInt64Array())
        : (await this.order(count)).subarray(from, from + most);
    return Array.from(window, String);
  }

  /** Places from 1 of those stars that pass the cuts. */
  async placesOf(starIds: readonly string[]): Promise<Map<string, number>> {
    const count = await this.count();
    if (starIds.length === 0 || count === 0) return new Map();
    if (count > MOST_ORDERED) return this.ask((c) => this.rank(c, starIds), new Map());
    const order = await this.order(count);
    return new Map(
      starIds.flatMap((id): [string, number][] => {
        const index = order.indexOf(BigInt(id));
        return index < 0 ? [] : [[id, index + 1]];
      }),
    );
  }

  private async rank(connection: DuckDBConnection, starIds: readonly string[]): Promise<Map<string, number>> {
    const { source, where, order, values } = this.parts();
    const result = await connection.runAndReadAll(
      `SELECT star_id, place::DOUBLE FROM
         (SELECT star_id, row_number() OVER (ORDER BY ${order}) AS place FROM ${source} WHERE ${where})
       WHERE star_id IN (${starIds.map(BigInt).join(", ")})`,
      values,
    );
    return new Map(result.getRowsJS().map(([id, place]) => [String(id), Number(place)]));
  }

  /** Which cuts, by their position, drop that star. */
  async droppedBy(starId: string): Promise<number[]> {
    const p = new Parameters();
    const cuts = compileCuts(this.resolved.view.cuts, p);
    const used = cuts.flatMap(({ sql, cut }, position) => (sql === null ? [] : [{ sql, cut, position }]));
    if (used.length === 0) return [];
    return this.ask(async (c) => {
      const select = used.map(({ sql, cut }) => passes(sql, cut)).join(", ");
      const result = await c.runAndReadAll(
        `SELECT ${select} FROM star WHERE star_id = ${BigInt(starId)}`,
        p.values,
      );
      const [row] = result.getRowsJS();
      return row ? used.filter((_, i) => row[i] === false).map(({ position }) => position) : [];
    }, []);
  }

  histograms(keys: readonly string[]): Promise<Histogram[]> {
    const p = new Parameters();
    const where = whereSql(compileCuts(this.resolved.view.cuts, p));
    return this.ask((c) => readHistograms(c, keys, where, p.values), []);
  }
}

/** Looks the view up and finds its index, or says that it is being built. */
export const openView = async (deps: Deps, programmeId: string, view: ViewSpec): Promise<OpenView> => {
  const resolved = await resolveView(deps, programmeId, view);
  if (resolved.edition === 0) return new OpenView(deps, resolved, null);
  const index = await findIndex(deps, {
    programmeId,
    edition: resolved.edition,
    cardVersionId: resolved.card?.versionId ?? null,
    // A campaign says nothing without an instrument.
    campaignVersionId: resolved.card ? (resolved.campaign?.versionId ?? null) : null,
  });
  return new OpenView(deps, resolved, index);
};
