import { useQuery } from '@tanstack/react-query';
import { Outlet } from 'react-router-dom';
import { ClosedDoor } from '#web/components/blank-state.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { DeskBar } from '#web/features/desk/components/desk-bar.tsx';
import { meQuery } from '#web/lib/me.ts';
import { SignedIn } from '../signed-in.tsx';

/** Everything under /review: for curators. */
export function Component() {
  const person = useQuery(meQuery());
  return (
    <SignedIn query={person} title="Review">
      {(me) => (me.curator ? (
        <>
          <DeskBar items={[{ to: '/review', label: 'Queue', end: true }, { to: '/review/withdrawals', label: 'Withdrawals' }]}><span className="org">Curator</span></DeskBar>
          <Outlet />
        </>
      ) : (
        <Wrap>
          <PageHead slim title="Review" />
          <ClosedDoor level={2} title="The review queue is not open to you">It is for curators. You are signed in as {me.user?.name ?? 'someone'}, who is none.</ClosedDoor>
        </Wrap>
      ))}
    </SignedIn>
  );
}
