import { useMutation } from '@tanstack/react-query';
import { Link, useLocation } from 'react-router-dom';
import type { Me } from '#shared/contracts/session.ts';
import { apiDo } from '#web/lib/api-client.ts';
import { signInAddress } from '#web/lib/me.ts';

/** The way to the search page, and in or out. */
export function Who({ person }: { person: Me | null }) {
  const { pathname, search } = useLocation();
  const signOut = useMutation({
    mutationFn: () => apiDo('POST', '/auth/sign-out'),
    onSuccess: () => window.location.assign('/'),
  });
  return (
    <>
      <Link to="/find">Find</Link>
      {person?.user ? (
        <>
          <span className="quiet nowrap">{person.user.name}</span>
          <button type="button" className="linkish" disabled={signOut.isPending} onClick={() => signOut.mutate()}>Sign out</button>
          {signOut.isError ? <span role="alert" className="faultword">Not signed out. Try again.</span> : null}
        </>
      ) : (
        <a href={signInAddress(pathname + search)}>Sign in</a>
      )}
    </>
  );
}
