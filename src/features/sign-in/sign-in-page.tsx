import { Link, Navigate, useNavigate, useSearchParams } from "react-router-dom";
import { signInBody } from "#shared/api/session.ts";
import { useSession, useSignIn } from "#src/api/session.ts";
import { paths } from "#src/app/paths.ts";
import { showTheme } from "#src/app/theme.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextInput } from "#src/ui/inputs.tsx";
import { PasswordInput } from "#src/ui/password-input.tsx";
import { homeOf, ownAddress } from "./destination.ts";
import { asClock, useWait } from "./use-wait.ts";
import { VisitorFrame } from "./visitor-frame.tsx";

const NOTICES: Readonly<Record<string, string>> = {
  "signed-out": "You are signed out.",
  ended: "Your session has ended. Sign in, and you are back where you were.",
};

const useSignInForm = (next: string | undefined) => {
  const navigate = useNavigate();
  const signIn = useSignIn();
  const form = useForm({
    schema: signInBody,
    initial: { email: "", password: "" },
    send: async (body) => {
      const { session } = await signIn.mutateAsync(body).catch((error: unknown) => {
        // What was typed while the answer was on its way stays.
        form.set((now) => (now.password === body.password ? { password: "" } : {}));
        throw error;
      });
      if (session.person?.theme) showTheme(session.person.theme);
      navigate(next ?? homeOf(session), { replace: true });
    },
  });
  return form;
};

const SignInForm = ({ next }: { next: string | undefined }) => {
  const form = useSignInForm(next);
  const wait = useWait(form.problem);
  return (
    <Form form={form}>
      <TextInput
        label="E-mail address"
        name="email"
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        value={form.values.email}
        error={form.fields.email}
        onChange={(event) => form.set({ email: event.target.value })}
      />
      <PasswordInput
        label="Password"
        name="password"
        autoComplete="current-password"
        value={form.values.password}
        error={form.fields.password}
        onChange={(event) => form.set({ password: event.target.value })}
      />
      <div className="mt-1 flex flex-wrap items-center justify-between gap-3">
        <Button type="submit" kind="main" isBusy={form.isBusy} disabled={wait > 0}>
          {wait > 0 ? `Wait ${asClock(wait)}` : "Sign in"}
        </Button>
        <Link
          className="text-[13px] underline decoration-edge underline-offset-4"
          to={paths.forgottenPassword.to()}
        >
          Forgotten your password?
        </Link>
      </div>
    </Form>
  );
};

const Content = () => {
  const [params] = useSearchParams();
  const session = useSession();
  const next = ownAddress(params.get("next"), window.location.origin);
  const notice = NOTICES[params.get("why") ?? ""];
  if (session.person) return <Navigate to={next ?? homeOf(session)} replace />;
  return (
    <>
      {notice ? (
        <p role="status" className="mb-4 border-l-2 border-ink pl-3">
          {notice}
        </p>
      ) : null}
      <SignInForm next={next} />
      {session.installation.isDemo ? (
        <p className="mt-6 border-t border-hair pt-4 text-[13px] text-soft">
          This is a demo installation with an invented sky. The terminal in which{" "}
          <code className="text-[12px]">npm start</code> runs shows the demo sign-ins.
        </p>
      ) : (
        <p className="mt-6 border-t border-hair pt-4 text-[13px] text-soft">
          New here? Ask an administrator of your programme to invite you by e-mail.
        </p>
      )}
    </>
  );
};

export const SignInPage = () => (
  <VisitorFrame title="Sign in">
    <Content />
  </VisitorFrame>
);
