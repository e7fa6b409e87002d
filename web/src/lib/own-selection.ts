import { useSyncExternalStore } from 'react';

/** The reader's own choice of entries, kept in this browser. The accent marks these and nothing else. */
export interface OwnEntry {
  accession: string;
  name: string;
}

const key = 'evenbeam.own';
const listeners = new Set<() => void>();
let cached: { text: string; list: readonly OwnEntry[] } = { text: '', list: [] };

const isOwn = (item: unknown): item is OwnEntry => typeof item === 'object' && item !== null && 'accession' in item && 'name' in item && typeof item.accession === 'string' && typeof item.name === 'string';

const read = (): readonly OwnEntry[] => {
  let text = cached.text;
  try {
    text = localStorage.getItem(key) ?? '';
  } catch {
    // Storage closed: the choice lasts for this page only.
  }
  if (text !== cached.text) {
    let list: unknown = [];
    try {
      list = JSON.parse(text);
    } catch {
      // Not ours, or broken: begin afresh.
    }
    cached = { text, list: Array.isArray(list) ? list.filter(isOwn) : [] };
  }
  return cached.list;
};

const write = (list: readonly OwnEntry[]): void => {
  const text = list.length > 0 ? JSON.stringify(list) : '';
  cached = { text, list };
  try {
    if (text) localStorage.setItem(key, text);
    else localStorage.removeItem(key);
  } catch {
    // See above.
  }
  for (const listener of listeners) listener();
};

const subscribe = (listener: () => void): (() => void) => {
  listeners.add(listener);
  window.addEventListener('storage', listener);
  return () => {
    listeners.delete(listener);
    window.removeEventListener('storage', listener);
  };
};

export function useOwnSelection() {
  const list = useSyncExternalStore(subscribe, read);
  return {
    list,
    has: (accession: string): boolean => list.some((own) => own.accession === accession),
    toggle: (entry: OwnEntry): void => write(list.some((own) => own.accession === entry.accession) ? list.filter((own) => own.accession !== entry.accession) : [...list, entry]),
    clear: (): void => write([]),
  };
}
