import { Link } from 'react-router-dom';
import { methodVersions, type MethodVersion } from '#shared/method/versions.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Part } from '../components/part.tsx';
import { literature } from '../literature.ts';

const columns: readonly Column<MethodVersion>[] = [
  { id: 'id', header: 'Version', rowHeader: true, nowrap: true, cell: (v) => v.id },
  { id: 'status', header: 'Standing', nowrap: true, cell: (v) => (v.status === 'official' ? 'official' : 'draft') },
  { id: 'since', header: 'Since', nowrap: true, cell: (v) => v.since },
  { id: 'passes', header: 'Passes', numeric: true, cell: (v) => v.passes },
  { id: 'changes', header: 'What it does', cell: (v) => v.changes },
];

export function Versions() {
  return (
    <Part id="versions" aside="A version once used is never changed.">
      <p className="prose">A frozen entry keeps the version it was frozen with. When a version follows, all entries are estimated again from their frozen data; the new results are added beside the old ones, which stay. A board names the version it is read by. Drafts are computed to see what a change would do; no entry is frozen with one.</p>
      <DataTable tight caption="Versions of the method" columns={columns} rows={methodVersions} rowKey={(v) => v.id} />
    </Part>
  );
}

export function Conformance() {
  return (
    <Part id="conformance" aside="For whoever writes the method anew in another language.">
      <p className="prose">Inputs with the results they must give are published at a fixed address, among them complete and deficient designs of one qubit, pairs, a chained register, and the numbers of the sampler step by step. A vector once named never changes. The list of all of them is <a href="/schema/conformance/M1/index.json"><code>/schema/conformance/M1/index.json</code></a>, with a <a href="/schema/conformance/README.md">guide</a> to what must agree and how closely; the formats stand on the <Link to="/schema">schema page</Link>.</p>
      <p className="prose">On a checkout, <code>npm run --silent estimate -- FILE.json</code> gives the official estimate of any dataset, and every entry can be recomputed on its own page.</p>
    </Part>
  );
}

export function Literature() {
  return (
    <Part id="literature">
      <ul className="plainlist literature">
        {literature.map(({ title, place, doi, use }) => <li key={doi}>“{title}”, {place}, doi:<a href={`https://doi.org/${doi}`}>{doi}</a>: {use}.</li>)}
      </ul>
    </Part>
  );
}
