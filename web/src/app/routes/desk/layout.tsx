import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Outlet } from 'react-router-dom';
import { DeskBar, OrganisationChoice, contributorItems } from '#web/features/desk/components/desk-bar.tsx';
import { contributing, rememberOrganisation, rememberedOrganisation } from '#web/features/desk/organisation.ts';
import { meQuery } from '#web/lib/me.ts';
import { SignedIn } from '../signed-in.tsx';

/** Everything under /desk: for people who are signed in; the bar is there for contributors. */
function DeskLayout() {
  const person = useQuery(meQuery());
  const [chosen, setChosen] = useState<string | null>(null);
  return (
    <SignedIn query={person} title="Desk">
      {(me) => {
        const own = contributing(me);
        const organisation = own.find((o) => o.id === chosen) ?? rememberedOrganisation(own, localStorage);
        const choose = (id: string): void => {
          rememberOrganisation(id, localStorage);
          setChosen(id);
        };
        return (
          <>
            {organisation ? <DeskBar items={contributorItems}><OrganisationChoice own={own} chosen={organisation} onChoose={choose} /></DeskBar> : null}
            <Outlet context={{ organisation }} />
          </>
        );
      }}
    </SignedIn>
  );
}

export { DeskLayout as Component };
