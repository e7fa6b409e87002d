import type { Asker } from '#shared/domain/rules.ts';

/** Who is behind a request, in plain values: entities stay with the request's own entity manager. */
export interface Caller {
  asker: Asker;
  user: { id: string; name: string; email: string } | null;
  token: { id: string; organisation: string } | null;
  organisations: { id: string; name: string; kind: 'provider' | 'laboratory' | 'buyer' | 'registry'; role: 'contributor' | 'viewer' | 'editor' | 'member' }[];
  /** To be sent back with changes; empty for tokens and strangers. */
  csrfToken: string;
}

export const stranger: Caller = {
  asker: { signedIn: false, isCurator: false, isSteward: false, viaToken: false, contributorOf: [], interestIn: [] },
  user: null,
  token: null,
  organisations: [],
  csrfToken: '',
};
