import { pointerOf, shown, valueAt } from '#shared/formats/pointer.ts';
import type { SchemaFault } from '#shared/formats/validators.js';

/** What each pattern of the schemas asks for, in words. A test checks that none is missing. */
export const patternWords: Readonly<Record<string, string>> = {
  '^[0-9a-f]{64}$': 'must be 64 hexadecimal digits in lower case',
  '^([0-9a-f]{2}){1,32}$': 'must be 2 to 64 hexadecimal digits in lower case, an even number of them',
  '^RS-[0-9]{6,9}$': 'must be the number of a run sheet such as "RS-000123"',
  '^(custom|[a-z0-9]+(-[a-z0-9]+)*/[1-9][0-9]{0,3})$': 'must be the id of a gate class such as "quarter-turn-1q/1", or "custom"',
  '^[a-z0-9]+(-[a-z0-9]+)*/[1-9][0-9]{0,3}$': 'must be the id of a gate class such as "quarter-turn-1q/1"',
  '^[0-9]{4}-[0-9]{4}-[0-9]{4}-[0-9]{3}[0-9X]$': 'must be an ORCID iD such as "0000-0002-1825-0097"',
  '^[0-9]{4}-[0-9]{2}-[0-9]{2}T[0-9]{2}:[0-9]{2}:[0-9]{2}(\\.[0-9]{1,9})?(Z|[+-][0-9]{2}:[0-9]{2})$': 'must be a date and time with its offset from UTC, such as "2026-05-04T08:00:00Z"',
  '^[A-Za-z0-9.+-]+$': 'must be an SPDX licence id such as "CC-BY-4.0"',
  '^[01]{1,256}$': 'must be a bit string of 0 and 1',
  '^M[1-9][0-9]{0,3}$': 'must be a method version such as "M1"',
  '^[^\\s\\u0000-\\u001f\\u007f-\\u009f\\u2028-\\u202e\\u2066-\\u2069\\ufeff][^\\u0000-\\u001f\\u007f-\\u009f\\u2028-\\u202e\\u2066-\\u2069\\ufeff]*$': 'must be one line of text that does not start with a blank and holds no control characters',
  '^[^\\u0000-\\u001f\\u007f-\\u009f\\u2028-\\u202e\\u2066-\\u2069\\ufeff]*$': 'must be one line of text without control characters',
  '^[^\\u0000-\\u0008\\u000b\\u000c\\u000e-\\u001f\\u007f-\\u009f\\u2028-\\u202e\\u2066-\\u2069\\ufeff]*$': 'must be text without control characters other than tab and line break',
};

const typeWords: Readonly<Record<string, string>> = {
  object: 'an object', array: 'a list', string: 'a text', number: 'a number', integer: 'a whole number', boolean: 'true or false', null: 'null',
};

const counted = (n: unknown, thing: string): string => `${String(n)} ${thing}${n === 1 ? '' : 's'}`;

/** What is asked for; the subject stands before it and the value after it. */
function requirement(fault: SchemaFault): string {
  const { keyword, params } = fault;
  switch (keyword) {
    case 'type': return `must be ${[params.type].flat().flatMap((t) => String(t).split(',')).map((t) => typeWords[t] ?? t).join(' or ')}`;
    case 'const': return `must be ${shown(params.allowedValue)}`;
    case 'enum': return `must be one of ${(params.allowedValues as unknown[]).map((v) => String(v)).join(', ')}`;
    case 'minimum': return `must be at least ${String(params.limit)}`;
    case 'maximum': return `must be at most ${String(params.limit)}`;
    case 'exclusiveMinimum': return `must be more than ${String(params.limit)}`;
    case 'exclusiveMaximum': return `must be less than ${String(params.limit)}`;
    case 'minLength': return `must have at least ${counted(params.limit, 'character')}`;
    case 'maxLength': return `must have at most ${counted(params.limit, 'character')}`;
    case 'minItems': return `must hold at least ${counted(params.limit, 'item')}`;
    case 'maxItems': return `must hold at most ${counted(params.limit, 'item')}`;
    case 'maxProperties': return `must have at most ${String(params.limit)} properties`;
    case 'pattern': return patternWords[String(params.pattern)] ?? `must match ${String(params.pattern)}`;
    default: return `breaks the rule "${keyword}"`;
  }
}

function subjectOf(pointer: string): string {
  const steps = pointer.split('/').slice(1).map((step) => step.replaceAll('~1', '/').replaceAll('~0', '~'));
  const last = steps.at(-1);
  if (last === undefined) return 'The file';
  if (!/^[0-9]+$/.test(last) || steps.length < 2) return shown(last);
  return `Item ${last} of ${shown(steps.at(-2))}`;
}

/**
 * A fault of the compiled schema as a pointer from the root of the file and a sentence; null for faults that only
 * repeat another one. `prefix` is the pointer of the value that was checked, `value` that value.
 */
export function schemaSentence(fault: SchemaFault, prefix: string, value: unknown): { pointer: string; message: string } | null {
  if (fault.keyword === 'if' || (fault.propertyName !== undefined && fault.keyword !== 'propertyNames')) return null;
  const pointer = prefix + fault.instancePath;
  const { params } = fault;
  switch (fault.keyword) {
    case 'required':
      return { pointer, message: `The property ${shown(params.missingProperty)} is missing.` };
    case 'additionalProperties':
      return { pointer: pointer + pointerOf(String(params.additionalProperty)), message: `There is no property ${shown(params.additionalProperty)} here; "extra" is the place for additions of your own.` };
    case 'propertyNames':
      return { pointer: pointer + pointerOf(String(params.propertyName)), message: `${shown(params.propertyName)} cannot be an outcome; it must be a bit string of 0 and 1.` };
    case 'uniqueItems':
      return { pointer: pointer + pointerOf(Math.max(Number(params.i), Number(params.j))), message: `${subjectOf(pointer)} holds the same item twice, at places ${Math.min(Number(params.i), Number(params.j))} and ${Math.max(Number(params.i), Number(params.j))}: ${shown(valueAt(value, `${fault.instancePath}/${String(params.j)}`))}.` };
    default:
      return { pointer, message: `${subjectOf(pointer)} ${requirement(fault)}; it is ${shown(valueAt(value, fault.instancePath))}.` };
  }
}
