/** Where keys are kept: sessionStorage in the browser, a Map-like stand-in in tests. */
export type KeyStore = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

const nameOf = (organisation: string, bytesSha256: string): string => `evenbeam.upload.${organisation}.${bytesSha256}`;

/**
 * The idempotency key of one file (by the SHA-256 of its unpacked bytes, as the registry takes its print) for one organisation: made at the first attempt, the same at every
 * retry and after a reload, so that a lost answer never leaves two submissions.
 */
export const keyForFile = (store: KeyStore, organisation: string, bytesSha256: string, fresh: () => string = () => crypto.randomUUID()): string => {
  const name = nameOf(organisation, bytesSha256);
  const kept = store.getItem(name);
  if (kept !== null) return kept;
  const key = fresh();
  store.setItem(name, key);
  return key;
};

/** After an answer that settles the matter the key has done its work: a later upload is a new act. */
export const dropKey = (store: KeyStore, organisation: string, bytesSha256: string): void => store.removeItem(nameOf(organisation, bytesSha256));
