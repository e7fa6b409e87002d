import { useMemo } from 'react';
import schema from '#schema/dataset/1.0.0.schema.json' with { type: 'json' };
import { PageHead } from '#web/components/page-head.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { FieldTable } from '#web/features/schema/components/field-table.tsx';
import { Validator } from '#web/features/schema/components/validator.tsx';
import { exampleDataset } from '#web/features/schema/example.ts';
import { fieldGroups, type SchemaNode } from '#web/features/schema/schema-fields.ts';
import { saveFile } from '#web/lib/save-file.ts';

const files = [
  ['dataset', 'Raw counts, what this page documents'], ['run-sheet', 'Circuits drawn by the registry, to be run'], ['seal', 'Opens the seal of a run sheet'],
  ['circuits', 'Circuits to predict'], ['result', 'Figures, intervals and predictions'], ['gate-class', 'Gates, floors and bench circuits of a board'],
] as const;

export function Component() {
  const groups = useMemo(() => fieldGroups(schema as SchemaNode), []);
  const example = useMemo(() => JSON.stringify(exampleDataset, null, 2), []);
  return (
    <Wrap>
      <PageHead title="Schema" opening="A dataset is one JSON file: what was run, on which qubits, and how often each outcome was seen. Nothing in it is a figure; the registry makes those." />
      <Section title="Check a file" aside="The same code as the registry’s own check."><Validator /></Section>
      <Section title="Example" aside="Valid, invented, and far below the floor of a board.">
        <details className="allfigures"><summary>A whole small dataset</summary><pre className="cmd">{example}</pre></details>
        <p className="takeaway"><button type="button" className="linkish" onClick={() => saveFile('evenbeam-example.json', 'application/json', `${example}\n`)}>Keep this example</button><a href="/schema/dataset/1.0.0.schema.json" download>JSON Schema, version 1.0.0</a></p>
      </Section>
      <Section title="Fields" aside="Read from the schema itself, format version 1.0.0. A property that is not named here is refused, except under extra." className="flow">
        {groups.map((group) => <FieldTable key={group.id} group={group} />)}
      </Section>
      <Section title="All formats" aside="Versioned and never changed; a change is a new version.">
        <ul className="plainlist">{files.map(([name, words]) => <li key={name}><a href={`/schema/${name}/1.0.0.schema.json`}>{name}</a> <span className="quiet">{words}</span></li>)}</ul>
      </Section>
    </Wrap>
  );
}
