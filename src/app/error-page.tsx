import { isRouteErrorResponse, Link, useRouteError } from "react-router-dom";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { paths } from "./paths.ts";

export const NotFoundPage = () => (
  <main className="mx-auto max-w-xl p-8">
    <h1 className="text-3xl">There is nothing at this address.</h1>
    <p className="mt-3 text-soft">The link may be cut off, or what it led to may be gone.</p>
    <p className="mt-6">
      <Link className="underline" to={paths.programmes.to()}>
        Go to your programmes
      </Link>
    </p>
  </main>
);

/** What a defect looks like to a person: said plainly, with a way on. */
export const ErrorPage = () => {
  const error = useRouteError();
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFoundPage />;
  return <ErrorNotice error={error} onRetry={() => window.location.reload()} isPage />;
};
