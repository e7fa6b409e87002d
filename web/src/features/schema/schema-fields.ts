import { formatCount } from '#shared/domain/format.ts';

/** The parts of JSON Schema 2020-12 that the shipped schemas use and that a reader needs. */
export interface SchemaNode {
  $ref?: string;
  title?: string;
  description?: string;
  type?: string | readonly string[];
  const?: unknown;
  enum?: readonly unknown[];
  pattern?: string;
  format?: string;
  minLength?: number;
  maxLength?: number;
  minItems?: number;
  maxItems?: number;
  minProperties?: number;
  maxProperties?: number;
  minimum?: number;
  maximum?: number;
  required?: readonly string[];
  properties?: Readonly<Record<string, SchemaNode>>;
  items?: SchemaNode;
  additionalProperties?: boolean | SchemaNode;
  oneOf?: readonly SchemaNode[];
  anyOf?: readonly SchemaNode[];
  then?: SchemaNode;
  else?: SchemaNode;
  $defs?: Readonly<Record<string, SchemaNode>>;
}

export interface FieldRow {
  name: string;
  required: boolean;
  /** "text", "list of gate", "whole number" … */
  kind: string;
  /** "1 to 200 characters" … */
  limits: string;
  description: string;
}

export interface FieldGroup {
  id: string;
  title: string;
  description: string;
  rows: readonly FieldRow[];
}

/** The forms a value may take: of a choice, or of a condition. */
const formsOf = (node: SchemaNode): readonly SchemaNode[] => node.oneOf ?? node.anyOf ?? [node.then, node.else].filter((form) => form !== undefined);

const nameOf = (ref: string): string => ref.slice(ref.lastIndexOf('/') + 1);
const words: Readonly<Record<string, string>> = { string: 'text', integer: 'whole number', number: 'number', boolean: 'true or false', object: 'object', array: 'list', null: 'null' };

/** "whole numbers", "gate objects". */
const severalOf = (kind: string, object: boolean): string => (object ? `${kind} objects` : kind.startsWith('list') ? kind.replace('list', 'lists') : `${kind}s`);

const range = (low: number | undefined, high: number | undefined, unit: string): string => {
  if (low !== undefined && high !== undefined) return low === high ? `exactly ${formatCount(low)} ${unit}` : `${formatCount(low)} to ${formatCount(high)} ${unit}`;
  if (low !== undefined) return `at least ${formatCount(low)} ${unit}`;
  return high === undefined ? '' : `at most ${formatCount(high)} ${unit}`;
};

/** Reads the field documentation out of a schema, one group for each object in it, in order of first mention. */
export function fieldGroups(root: SchemaNode): FieldGroup[] {
  const defs = root.$defs ?? {};
  const resolve = (node: SchemaNode): SchemaNode => (node.$ref ? { ...resolve(defs[nameOf(node.$ref)] ?? {}), ...(node.description ? { description: node.description } : {}) } : node);
  const hasFields = (node: SchemaNode): boolean => node.properties !== undefined;

  const kindOf = (node: SchemaNode): string => {
    const whole = resolve(node);
    const many = formsOf(whole);
    if (whole.const !== undefined) return JSON.stringify(whole.const);
    if (whole.enum) return whole.enum.map((v) => JSON.stringify(v)).join(', ');
    if (many.length > 0) return [...new Set(many.map(kindOf))].join(' or ');
    if (whole.items) return `list of ${severalOf(kindOf(whole.items), hasFields(resolve(whole.items)))}`;
    if (node.$ref && hasFields(whole)) return `${nameOf(node.$ref)}${Array.isArray(whole.type) && whole.type.includes('null') ? ' or null' : ''}`;
    const types = typeof whole.type === 'string' ? [whole.type] : (whole.type ?? []);
    return types.map((t) => words[t] ?? t).join(' or ') || 'anything';
  };
  const limitsOf = (node: SchemaNode): string => {
    const n = resolve(node);
    const shortPattern = n.pattern !== undefined && n.pattern.length <= 48 ? `matches ${n.pattern}` : '';
    return [range(n.minLength, n.maxLength, 'characters'), range(n.minItems, n.maxItems, 'items'), range(n.minProperties, n.maxProperties, 'keys'), range(n.minimum, n.maximum, ''), shortPattern].map((t) => t.trim()).filter(Boolean).join('; ');
  };

  const groups: FieldGroup[] = [];
  const seen = new Set<string>();
  const visit = (id: string, node: SchemaNode): void => {
    const whole = resolve(node);
    if (seen.has(id)) return;
    if (whole.properties) {
      seen.add(id);
      groups.push({
        id,
        title: whole.title ?? id,
        description: whole.description ?? '',
        rows: Object.entries(whole.properties).map(([name, field]) => ({ name, required: whole.required?.includes(name) ?? false, kind: kindOf(field), limits: limitsOf(field), description: resolve(field).description ?? '' })),
      });
    }
    for (const child of childrenOf(whole)) visit(child.$ref ? nameOf(child.$ref) : `${id}…`, child);
  };
  const childrenOf = (node: SchemaNode): SchemaNode[] => {
    const direct = [...Object.values(node.properties ?? {}), ...formsOf(node), ...(node.items ? [node.items] : []), ...(typeof node.additionalProperties === 'object' ? [node.additionalProperties] : [])];
    return direct.flatMap((child) => (child.$ref ? [child] : childrenOf(child)));
  };
  visit('dataset', root);
  return groups;
}
