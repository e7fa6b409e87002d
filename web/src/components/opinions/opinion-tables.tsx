import type { Opinions, TimedOpinion } from '#shared/contracts/opinions.ts';
import { figureName } from '#shared/domain/figure-words.ts';
import { formatNumber } from '#shared/domain/format.ts';
import { DataTable, type Column } from '../data-table.tsx';
import { convergenceWords, distanceWords, figureDigits, routeName, secondsWords, shortName, whatItDoes, type OpinionFigure } from './opinion-words.ts';

/** Words of a gate by its label, and of a patch by its qubits. */
export interface Naming {
  gate: (label: string) => string;
  qubits: (qubits: readonly number[]) => string;
}

const keyOf = (f: OpinionFigure): string => `${f.key}:${f.depth ?? ''}:${f.gate ?? ''}:${f.qubits.join('-')}`;

function Value({ figure, official = false }: { figure: OpinionFigure | undefined; official?: boolean }) {
  if (!figure) return <span className="quiet">none</span>;
  const value = official ? figure.official : figure.value;
  if (value === null) return <span className="quiet">{official ? 'not determined' : figure.reason?.startsWith('not defined') ? 'not defined' : 'not determined'}</span>;
  const apart = official ? null : distanceWords(figure);
  return <>{official ? <b>{formatNumber(value, figureDigits(figure))}</b> : formatNumber(value, figureDigits(figure))}{apart ? <span className="sub nowrap">{apart}</span> : null}</>;
}

/** Figure by figure: the official value, and beside it each route's with its distance. */
export function OpinionFigures({ data, naming }: { data: Opinions; naming: Naming }) {
  const offered = data.opinions.filter((o) => o.reason === null);
  // Patches of a register differ only in their qubits; a register of one is not named.
  const patched = offered.some((o) => o.scope === 'one-qubit-patches');
  const rows = offered[0]?.figures ?? [];
  const find = (o: TimedOpinion, row: OpinionFigure): OpinionFigure | undefined => o.figures.find((f) => keyOf(f) === keyOf(row));
  const name = (f: OpinionFigure): string => `${figureName(f, f.gate === null ? undefined : naming.gate(f.gate))}${patched && f.gate === null ? `, ${naming.qubits(f.qubits)}` : ''}`;
  const columns: readonly Column<OpinionFigure>[] = [
    { id: 'figure', header: 'Figure', rowHeader: true, cell: name },
    { id: 'official', header: data.method, unit: 'official', numeric: true, cell: (f) => <Value figure={f} official /> },
    ...offered.map((o): Column<OpinionFigure> => ({ id: o.method, header: shortName(o.method), numeric: true, cell: (f) => <Value figure={find(o, f)} /> })),
  ];
  return <DataTable tight caption={<>Figures by each route <span className="quiet">under each its distance from {data.method} in standard errors (s.e.) of {data.method}</span></>} region="Figures by each route" columns={columns} rows={rows} rowKey={keyOf} />;
}

interface RouteRow {
  id: string;
  name: string;
  words: string[];
  error: number | null;
  refused: string | null;
  seconds: number | null;
}

const rowOf = (o: TimedOpinion): RouteRow => ({
  id: o.method, name: routeName(o.method), error: o.prediction?.value ?? null, refused: o.reason, seconds: o.seconds,
  words: o.reason === null ? [whatItDoes(o.method), ...(o.convergence ? [convergenceWords(o.convergence)] : []), ...o.notes.filter((n) => !n.startsWith('Did not converge'))] : [],
});

/** Route by route: what it does otherwise, its prediction error on the sealed circuits, its running time. */
export function OpinionRoutes({ data }: { data: Opinions }) {
  const compared = data.opinions.find((o) => o.prediction !== null)?.prediction ?? null;
  const official: RouteRow = { id: 'official', name: `${data.method}, the official estimate`, words: [], error: compared?.official ?? null, refused: null, seconds: data.officialSeconds };
  const ideal: RouteRow = { id: 'ideal', name: 'Ideal device', words: ['What a prediction without any error model gives.'], error: compared?.ideal ?? null, refused: null, seconds: null };
  const columns: readonly Column<RouteRow>[] = [
    { id: 'route', header: 'Route', rowHeader: true, cell: (r) => r.name },
    { id: 'what', header: 'What it does', cell: (r) => (r.refused !== null ? <span className="quiet"><b>Not offered.</b> {r.refused}</span> : r.words.length === 0 ? 'Its figures stand above.' : r.words.map((w) => <span key={w} className="line">{w} </span>)) },
    { id: 'error', header: 'Prediction error', unit: compared ? `on ${compared.circuits} sealed circuits` : 'no sealed circuits', numeric: true, cell: (r) => (r.error === null ? <span className="quiet">none</span> : formatNumber(r.error, 4)) },
    { id: 'time', header: 'Time', numeric: true, nowrap: true, cell: (r) => (r.seconds === null ? <span className="quiet">none</span> : secondsWords(r.seconds)) },
  ];
  return <DataTable tight caption={<>Routes <span className="quiet">times on the registry’s machine, without replicates</span></>} region="Routes" columns={columns} rows={[official, ...data.opinions.map(rowOf), ...(compared ? [ideal] : [])]} rowKey={(r) => r.id} />;
}
