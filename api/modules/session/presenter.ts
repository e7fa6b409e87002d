import type { Me } from '#shared/contracts/session.ts';
import type { Caller } from '#api/lib/caller.ts';

export const presentMe = ({ user, asker, organisations, csrfToken }: Caller): Me => ({ user, curator: asker.isCurator, steward: asker.isSteward, organisations, csrfToken });
