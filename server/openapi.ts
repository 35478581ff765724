import { z } from "zod";
import { errorBody } from "#shared/api/common.ts";
import { type Action, RIGHTS } from "#shared/policy/rights.ts";
import { ROLE_LABELS } from "#shared/policy/roles.ts";
import type { Access, DefinedRoute, Routes } from "./http/route.ts";
import { SESSION_COOKIE } from "./http/session.ts";

type Json = Record<string, unknown>;

const ERROR = { $ref: "#/components/schemas/Error" };

/** `answers` are what the server makes of a schema, everything else what it takes. */
const jsonSchema = (schema: z.ZodType, io: "input" | "output" = "input"): Json => {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: "any" });
  return rest;
};

const jsonContent = (schema: Json): Json => ({ content: { "application/json": { schema } } });

const whoMay = (access: Access): string => {
  if (access === "anyone") return "Anyone, signed in or not.";
  if (access === "signed-in") return "Anyone who is signed in.";
  if (access === "installation-administrator") return "Administrators of the installation.";
  return `Members with one of these roles: ${RIGHTS[access as Action].map((role) => ROLE_LABELS[role]).join(", ")}.`;
};

const parameters = (route: DefinedRoute): Json[] => {
  const inPath = [...route.path.matchAll(/:(\w+)/g)].map(([, name]) => ({
    name,
    in: "path",
    required: true,
    schema: { type: "string" },
  }));
  const query = route.query ? jsonSchema(route.query) : {};
  const required = (query.required ?? []) as string[];
  const inQuery = Object.entries((query.properties ?? {}) as Json).map(([name, schema]) => ({
    name,
    in: "query",
    required: required.includes(name),
    schema,
  }));
  return [...inPath, ...inQuery];
};

const responses = (route: DefinedRoute): Json => ({
  [route.answer ? (route.status ?? 200) : (route.status ?? "2XX")]: {
    description: "Done.",
    ...(route.answer ? jsonContent(jsonSchema(route.answer, "output")) : {}),
  },
  default: { description: "Refused or failed: what, why, and what to do.", ...jsonContent(ERROR) },
});

const operation = (route: DefinedRoute): Json => ({
  description: whoMay(route.access),
  parameters: parameters(route),
  ...(route.body ? { requestBody: { required: true, ...jsonContent(jsonSchema(route.body)) } } : {}),
  responses: responses(route),
  ...(route.access === "anyone" ? { security: [] } : {}),
});

/** The interface as an OpenAPI document, from the schemas that the routes parse with. */
export const describeInterface = (routes: readonly DefinedRoute[]): Json => {
  const paths: Record<string, Json> = {};
  for (const route of routes) {
    const path = `/api${route.path.replace(/:(\w+)/g, "{$1}")}`;
    paths[path] = { ...paths[path], [route.method]: operation(route) };
  }
  return {
    openapi: "3.1.0",
    info: {
      title: "Shortlight",
      version: "1",
      description:
        "Identifiers and other 64-bit integers travel as strings. Every change needs the token of GET /api/session in the header X-CSRF-Token. Things of programmes one is no member of are answered as if they did not exist.",
    },
    security: [{ session: [] }],
    components: {
      securitySchemes: { session: { type: "apiKey", in: "cookie", name: SESSION_COOKIE } },
      schemas: { Error: jsonSchema(errorBody, "output") },
    },
    paths,
  };
};

export const addInterfaceRoutes = (routes: Routes): void => {
  routes.add({ method: "get", path: "/openapi.json", access: "anyone" }, () =>
    describeInterface(routes.defined),
  );
};
