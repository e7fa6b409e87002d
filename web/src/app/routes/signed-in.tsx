import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { useLocation } from 'react-router-dom';
import type { Me } from '#shared/contracts/session.ts';
import { ClosedDoor } from '#web/components/blank-state.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { signInAddress } from '#web/lib/me.ts';

interface Props {
  query: UseQueryResult<Me>;
  /** Name of the page that waits behind the door. */
  title: string;
  children: (me: Me) => ReactNode;
}

/** Shows its page to people who are signed in; others are told so, and come back here afterwards. */
export function SignedIn({ query, title, children }: Props) {
  const { pathname, search } = useLocation();
  if (query.data?.user) return <>{children(query.data)}</>;
  return (
    <Wrap>
      <PageHead title={title} slim />
      <Read level={2} query={query} what="Your sign-in" loading="Asking who you are" rows={1}>
        {() => (
          <ClosedDoor level={2} title="Sign in first" act={<a className="btn main-act" href={signInAddress(pathname + search)}>Sign in</a>}>
            This page belongs to the people who work with it. You come back here after signing in.
          </ClosedDoor>
        )}
      </Read>
    </Wrap>
  );
}
