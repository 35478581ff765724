import type { RequestHandler } from "express";
import helmet from "helmet";
import type { Deps } from "../deps.ts";

/** No script but our own files. Styles of elements may be set by code (widths, places), style sheets may not. */
export const securityHeaders = (deps: Deps): RequestHandler => {
  const isHttps = deps.config.publicUrl.startsWith("https:");
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'"],
        styleSrcAttr: ["'unsafe-inline'"],
        imgSrc: ["'self'", "data:"],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        workerSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        ...(isHttps ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: isHttps,
    referrerPolicy: { policy: "same-origin" },
    xFrameOptions: { action: "deny" },
  });
};
