import type { Request, Response, Router } from "express";
import type { z } from "zod";
import type { Action, Actor } from "#shared/policy/rights.ts";
import type { Deps } from "../deps.ts";
import { authorise } from "./authorise.ts";
import { parse } from "./parse.ts";

/**
 * Who may call a route: an action of the rights table (the path then carries `:programmeId`), or one of the few
 * words for routes outside programmes. There is no default, so a route without an answer does not compile.
 */
export type Access = Action | "anyone" | "signed-in" | "installation-administrator";

export interface Caller {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly isInstallationAdministrator: boolean;
}

export interface RouteSpec<B extends z.ZodType, Q extends z.ZodType> {
  method: "get" | "post" | "put" | "patch" | "delete";
  /** Below /api, Express 5 syntax. */
  path: string;
  access: Access;
  /** Parsed JSON body; absent: the route takes none (a raw stream stays untouched on `req`). */
  body?: B;
  query?: Q;
  /** Status of a JSON answer; 200 unless said. */
  status?: number;
  /** Shape of the JSON answer, for the description of the interface. */
  answer?: z.ZodType;
}

export interface Context<B, Q> {
  deps: Deps;
  /** Set unless the route is open to anyone. */
  caller: Caller;
  /** Roles in the programme of the path; none outside programmes. */
  actor: Actor;
  /** Id of the programme of the path; empty outside programmes. */
  programmeId: string;
  params: Record<string, string>;
  body: B;
  query: Q;
  req: Request;
  res: Response;
}

/** Every route that was defined, for the interface's description and for the test that walks route × role. */
export type DefinedRoute = Readonly<RouteSpec<z.ZodType, z.ZodType>>;

/**
 * Collects a subject's routes. The handler's answer becomes the JSON body; `undefined` with an unsent response
 * becomes 204; a handler that streams writes to `res` itself.
 */
export class Routes {
  readonly defined: DefinedRoute[] = [];

  constructor(
    private readonly router: Router,
    private readonly deps: Deps,
  ) {}

  add<B extends z.ZodType = z.ZodUndefined, Q extends z.ZodType = z.ZodUndefined>(
    spec: RouteSpec<B, Q>,
    handle: (context: Context<z.output<B>, z.output<Q>>) => unknown,
  ): void {
    this.defined.push(spec);
    this.router[spec.method](spec.path, async (req: Request, res: Response) => {
      const who = await authorise(this.deps, req, spec.access);
      const context = {
        deps: this.deps,
        ...who,
        params: req.params as Record<string, string>,
        body: parse(spec.body, req.body ?? {}, "body") as z.output<B>,
        query: parse(spec.query, req.query, "query") as z.output<Q>,
        req,
        res,
      };
      const answer = await handle(context);
      if (res.headersSent || res.writableEnded) return;
      if (answer === undefined) res.status(204).end();
      else res.status(spec.status ?? 200).json(answer);
    });
  }
}
