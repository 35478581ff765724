import type { ErrorRequestHandler, RequestHandler } from "express";
import type { ErrorBody } from "#shared/api/common.ts";
import type { Deps } from "../deps.ts";
import { AppError, notFound } from "../errors.ts";
import { knownError } from "./known-errors.ts";

/** Not a failure: the client asks again each second until the table is there. */
const AWAITED = "scan-index-building";

const defect = (requestId: string): AppError =>
  new AppError(
    500,
    "defect",
    "Something in Shortlight failed that should not have. Your data is as it was.",
    {
      hint: `Try again. If it happens again, tell whoever runs this installation: request ${requestId}.`,
    },
  );

const bodyOf = (error: AppError): ErrorBody => ({
  error: {
    code: error.code,
    message: error.message,
    hint: error.hint,
    fields: error.fields,
    details: error.details,
  },
});

/** Nothing here by that address. */
export const noSuchRoute: RequestHandler = () => {
  throw notFound();
};

/** The one place that turns errors into answers. */
export const errorHandler =
  (deps: Deps): ErrorRequestHandler =>
  (error, req, res, next) => {
    const known = knownError(error);
    if (known?.code === AWAITED)
      deps.log.debug("http", "A request waits", { requestId: req.requestId, error });
    else if (!known || known.status >= 500)
      deps.log.error("http", "A request failed", { requestId: req.requestId, error });
    // A half-sent file must not look whole: Express ends the connection.
    if (res.headersSent) return next(error);
    const answer = known ?? defect(req.requestId);
    res.status(answer.status).json(bodyOf(answer));
  };
