import { Outlet, useOutletContext } from 'react-router-dom';
import { ClosedDoor } from '#web/components/blank-state.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import type { DeskContext } from '#web/features/desk/organisation.ts';

/** The organisation that a page under this door works for. */
export const useDesk = (): DeskContext => useOutletContext<DeskContext>();

/** Pages that make or list things of an organisation are for its contributors. */
function ContributorDoor() {
  const { organisation } = useOutletContext<{ organisation: DeskContext['organisation'] | null }>();
  if (organisation) return <Outlet context={{ organisation } satisfies DeskContext} />;
  return (
    <Wrap>
      <PageHead title="Desk" slim />
      <ClosedDoor level={2} title="The desk is not open to you">
        It is for contributors of a provider or a laboratory. Ask a contributor of your organisation, or a steward of the registry, to add you.
      </ClosedDoor>
    </Wrap>
  );
}

export { ContributorDoor as Component };
