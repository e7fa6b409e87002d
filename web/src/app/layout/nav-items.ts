import { isContributor } from '#web/lib/me.ts';
import type { Me } from '#shared/contracts/session.ts';

export interface NavItem {
  to: string;
  label: string;
}

/** Pages everyone may read, in the order of the header. */
export const publicItems: readonly NavItem[] = [
  { to: '/boards', label: 'Boards' },
  { to: '/devices', label: 'Devices' },
  { to: '/method', label: 'Method' },
  { to: '/schema', label: 'Schema' },
];

/** Pages of the person at the screen. */
export const personalItems = (person: Me | null): readonly NavItem[] => [
  ...(isContributor(person) ? [{ to: '/desk', label: 'Desk' }] : []),
  ...(person?.curator ? [{ to: '/review', label: 'Review' }] : []),
  ...(person?.steward ? [{ to: '/steward', label: 'Office' }] : []),
];
