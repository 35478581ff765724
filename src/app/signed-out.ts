import { whenSignedOut } from "#src/api/client.ts";
import { paths } from "./paths.ts";

/**
 * Where a session ends while someone works, the sign-in page takes over and brings them back afterwards. The page is
 * loaded anew, so that nothing of one person stays in memory for the next.
 */
export const leadToSignIn = (): void =>
  whenSignedOut(() => {
    const { pathname, search } = window.location;
    if (pathname === paths.signIn.pattern) return;
    window.location.assign(paths.signIn.to(pathname + search, "ended"));
  });
