import type { Request, RequestHandler, Response } from "express";
import passportModule from "passport";
import { Strategy } from "passport-local";
import { Person } from "../database/entities/person.entity.ts";
import type { Deps } from "../deps.ts";
import type { Caller } from "../http/route.ts";
import { verifySignIn } from "./sign-in.ts";

/** Reads the signed-in person anew with each request: one who was deactivated is out at once. */
const findCaller = async (deps: Deps, id: string): Promise<Caller | false> => {
  const person = await deps.db.manager.findOne(Person, {
    where: { id, isActive: true },
    select: { id: true, name: true, email: true, isInstallationAdministrator: true },
  });
  if (!person) return false;
  const { name, email, isInstallationAdministrator } = person;
  return { id: person.id, name, email, isInstallationAdministrator };
};

type Passport = InstanceType<typeof passportModule.Passport>;

const createPassport = (deps: Deps): Passport => {
  const passport = new passportModule.Passport();
  passport.use(
    new Strategy({ usernameField: "email", passwordField: "password" }, (email, password, done) => {
      verifySignIn(deps, email, password).then((caller) => done(null, caller ?? false), done);
    }),
  );
  passport.serializeUser((user, done) => done(null, user.id));
  passport.deserializeUser((id: string, done) => {
    findCaller(deps, id).then((caller) => done(null, caller), done);
  });
  return passport;
};

const made = new WeakMap<Deps, Passport>();

/** One for each set of dependencies: two applications in one process stay apart. */
const passportFor = (deps: Deps): Passport => {
  const passport = made.get(deps) ?? createPassport(deps);
  made.set(deps, passport);
  return passport;
};

/** Puts the signed-in person on `req.user`. */
export const signedInPerson = (deps: Deps): RequestHandler => passportFor(deps).session();

/** The person whose address and password stand in the body, or false. It does not sign in yet. */
export const authenticate = (deps: Deps, req: Request, res: Response): Promise<Caller | false> =>
  new Promise((resolve, reject) => {
    const answer = (error: unknown, caller?: Caller | false): void =>
      error ? reject(error) : resolve(caller || false);
    passportFor(deps).authenticate("local", answer)(req, res, reject);
  });
