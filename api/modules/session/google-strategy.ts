import passport from 'passport';
import { Strategy, type Profile, type StrategyOptions, type VerifyCallback } from 'passport-google-oauth20';
import type { Deps } from '#api/lib/deps.ts';
import { signIn, type Identity } from './sign-in-service.ts';

export const callbackPath = '/auth/google/callback';

const identityOf = (profile: Profile): Identity => ({
  subject: profile.id,
  email: profile.emails?.[0]?.value ?? '',
  emailVerified: String(profile._json.email_verified) === 'true',
  name: profile.displayName,
});

/** Sign-in by authorisation code with state and PKCE; the addresses come from the configuration. */
export const googlePassport = ({ config, orm, clock }: Pick<Deps, 'config' | 'orm' | 'clock'>): passport.Authenticator => {
  const own = new passport.Passport();
  // `state` and `pkce` are known to the library and missing from its types.
  const options = {
    clientID: config.google.clientId,
    clientSecret: config.google.clientSecret,
    authorizationURL: config.google.authorizationUrl,
    tokenURL: config.google.tokenUrl,
    userProfileURL: config.google.userinfoUrl,
    callbackURL: config.publicUrl + callbackPath,
    scope: ['openid', 'email', 'profile'],
    state: true,
    pkce: true,
  } as unknown as StrategyOptions;
  own.use(
    new Strategy(options, (_access: string, _refresh: string, profile: Profile, done: VerifyCallback) => {
      signIn(orm.em.fork(), identityOf(profile), clock.now()).then((user) => done(null, user), (fault: unknown) => done(fault as Error));
    }),
  );
  own.serializeUser((user, done) => done(null, (user as { id: string }).id));
  return own;
};
