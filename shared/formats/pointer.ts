/** JSON Pointer (RFC 6901) of a place: keys and indices from the outside in; "" is the whole file. */
export function pointerOf(...path: readonly (string | number)[]): string {
  return path.map((step) => `/${String(step).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

/** The value at a JSON Pointer, or undefined where there is none. */
export function valueAt(root: unknown, pointer: string): unknown {
  let value = root;
  for (const raw of pointer.split('/').slice(1)) {
    const step = raw.replaceAll('~1', '/').replaceAll('~0', '~');
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, step)) return undefined;
    value = (value as Record<string, unknown>)[step];
  }
  return value;
}

/** A value as it may stand in a sentence: JSON, control characters escaped, cut after 60 characters. */
export function shown(value: unknown): string {
  if (value === undefined) return 'absent';
  if (Array.isArray(value) && value.length > 8) return `a list of ${value.length}`;
  if (typeof value === 'object' && value !== null && !Array.isArray(value)) return `an object of ${Object.keys(value).length} properties`;
  const text = typeof value === 'string' ? JSON.stringify(value.slice(0, 80)) : JSON.stringify(value);
  // Characters that turn the reading direction round would garble the sentence they stand in.
  const plain = text.replace(/[\u007f-\u009f\u200e\u200f\u2028-\u202e\u2066-\u2069\ufeff]/g, (c) => `\\u${c.charCodeAt(0).toString(16).padStart(4, '0')}`);
  const characters = [...plain];
  return characters.length > 60 ? `${characters.slice(0, 57).join('')}…` : plain;
}
