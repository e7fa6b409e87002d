import { useQuery } from '@tanstack/react-query';
import { Outlet } from 'react-router-dom';
import { ClosedDoor } from '#web/components/blank-state.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { DeskBar, type DeskItem } from '#web/features/desk/components/desk-bar.tsx';
import { meQuery } from '#web/lib/me.ts';
import { SignedIn } from '../signed-in.tsx';

const items: readonly DeskItem[] = [
  { to: '/steward/campaigns', label: 'Methods and campaigns' },
  { to: '/steward/jobs', label: 'Jobs' },
  { to: '/steward/mail', label: 'Mail' },
  { to: '/steward/people', label: 'People' },
];

/** Everything under /steward: for stewards. */
export function Component() {
  const person = useQuery(meQuery());
  return (
    <SignedIn query={person} title="Steward’s office">
      {(me) => (me.steward ? (
        <>
          <DeskBar items={items}><span className="org">Steward</span></DeskBar>
          <Outlet />
        </>
      ) : (
        <Wrap>
          <PageHead slim title="Steward’s office" />
          <ClosedDoor level={2} title="The steward’s office is not open to you">It is for stewards. You are signed in as {me.user?.name ?? 'someone'}, who is none.</ClosedDoor>
        </Wrap>
      ))}
    </SignedIn>
  );
}
