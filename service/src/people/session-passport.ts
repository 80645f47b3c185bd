import { Passport } from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Request } from 'express';
import { DeskError } from '../errors';
import type { SignedInPerson } from './person';
import type { SignInService } from './sign-in-service';

export type SessionPassport = InstanceType<typeof Passport>;

/** Passport with the e-mail and password strategy; the session holds the person's id alone. */
export function sessionPassport(signIns: SignInService): SessionPassport {
  const passport = new Passport();
  passport.use(
    new LocalStrategy(
      { usernameField: 'email', passReqToCallback: true },
      (request: Request, email: string, password: string, done) => {
        signIns.signIn({ email, password, address: request.ip ?? 'unknown' }).then(
          (person) => done(null, person),
          (error: unknown) => done(error),
        );
      },
    ),
  );
  passport.serializeUser<string>((person, done) => done(null, (person as SignedInPerson).id));
  passport.deserializeUser<string>((id, done) => {
    signIns.personOfSession(id).then(
      (person) => done(null, person ?? false),
      (error: unknown) => done(error),
    );
  });
  return passport;
}

export function personOf(request: Request): SignedInPerson {
  const person = request.user as SignedInPerson | undefined;
  if (!person) throw new DeskError('sign-in-required', 'Sign in and repeat the call.');
  return person;
}
