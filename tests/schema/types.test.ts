import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';
import { expect, test } from 'vitest';

/** Where each interface of the types file (left) is described by a schema (right, file#pointer). */
const pairs: [type: string, schema: string][] = [
  ['Dataset', 'dataset#'], ['Dataset.device', 'dataset#/$defs/device'], ['Dataset.runSheet', 'dataset#/$defs/runSheet'], ['Dataset.acquisition', 'dataset#/$defs/acquisition'],
  ['Dataset.contributors', 'dataset#/$defs/contributor'], ['DatasetPatch', 'dataset#/$defs/patch'], ['DatasetCircuit', 'dataset#/$defs/circuit'], ['GateDeclaration', 'dataset#/$defs/gate'],
  ['CircuitsFile', 'circuits#'], ['PlainCircuit', 'circuits#/$defs/plainCircuit'],
  ['RunSheet', 'run-sheet#'], ['RunSheet.device', 'run-sheet#/$defs/sheetDevice'], ['RunSheet.patches', 'run-sheet#/$defs/sheetPatch'], ['SheetCircuit', 'run-sheet#/$defs/sheetCircuit'],
  ['Seal', 'seal#'],
  ['GateClass', 'gate-class#'], ['GateClass.floor', 'gate-class#/properties/floor'], ['GateClass.bench', 'gate-class#/$defs/benchDepth'], ['PlainCircuit', 'gate-class#/$defs/benchCircuit'],
  ['Result', 'result#'], ['PatchResult', 'result#/$defs/patchResult'], ['PatchResult.gateMaps', 'result#/$defs/gateMap'], ['Misfit', 'result#/$defs/misfit'], ['Figure', 'result#/$defs/figure'],
  ['Interval', 'result#/$defs/interval'], ['SealedCheck', 'result#/$defs/sealedCheck'], ['Prediction', 'result#/$defs/prediction'],
];

const file = fileURLToPath(new URL('../../shared/formats/types.ts', import.meta.url));
const program = ts.createProgram([file], { strict: true, noLib: true, types: [] });
const checker = program.getTypeChecker();
const source = program.getSourceFile(file);

/** The type of `Interface` or `Interface.property`; lists and null are looked through. */
function typeOf(name: string): ts.Type {
  const [outer, inner] = name.split('.');
  const declared = source?.statements.find((statement): statement is ts.InterfaceDeclaration => ts.isInterfaceDeclaration(statement) && statement.name.text === outer);
  if (!declared) throw new Error(`no interface ${name}`);
  if (inner === undefined) return checker.getTypeAtLocation(declared);
  let node = declared.members.find((member): member is ts.PropertySignature => ts.isPropertySignature(member) && member.name.getText() === inner)?.type;
  if (node && ts.isUnionTypeNode(node)) node = node.types.find((type) => !ts.isLiteralTypeNode(type));
  if (node && ts.isArrayTypeNode(node)) node = node.elementType;
  if (!node) throw new Error(`no property ${name}`);
  return checker.getTypeFromTypeNode(node);
}

function schemaAt(place: string): { properties: Record<string, unknown>; required: string[] } {
  const [name, pointer] = place.split('#');
  let node = JSON.parse(readFileSync(new URL(`../../schema/${name}/1.0.0.schema.json`, import.meta.url), 'utf8')) as Record<string, unknown>;
  for (const step of (pointer ?? '').split('/').slice(1)) node = node[step] as Record<string, unknown>;
  return node as never;
}

test.each(pairs)('the type %s and the schema %s name the same properties, optional in both or in neither', (type, place) => {
  const properties = typeOf(type).getProperties();
  const schema = schemaAt(place);
  expect(properties.map((property) => property.name).sort()).toEqual(Object.keys(schema.properties).sort());
  const always = properties.filter((property) => !(property.flags & ts.SymbolFlags.Optional)).map((property) => property.name);
  expect(always.sort()).toEqual([...schema.required].sort());
});

test('no interface of the types file is left out', () => {
  const interfaces = source?.statements.filter(ts.isInterfaceDeclaration).map((statement) => statement.name.text) ?? [];
  expect(new Set(pairs.map(([type]) => type.split('.')[0]))).toEqual(new Set(interfaces));
});

test('the lists of allowed words agree', () => {
  const wordsOf = (name: string): string[] => {
    const alias = source?.statements.find((statement): statement is ts.TypeAliasDeclaration => ts.isTypeAliasDeclaration(statement) && statement.name.text === name);
    if (!alias || !ts.isUnionTypeNode(alias.type)) throw new Error(`no union ${name}`);
    return alias.type.types.map((type) => type.getText().slice(1, -1));
  };
  expect(wordsOf('Modality')).toEqual((schemaAt('dataset#/$defs/device').properties.modality as { enum: string[] }).enum);
  expect(wordsOf('FigureKey')).toEqual((schemaAt('result#/$defs/figure').properties.key as { enum: string[] }).enum);
});
