import { createSortedRowModel, rowSortingFeature, tableFeatures, useTable, type ColumnDef, type SortingState } from '@tanstack/react-table';
import { useMemo, useState, type ReactNode } from 'react';
import { scrollRegion, tableRoles as r } from './table-roles.ts';

/** What a column sorts by: numbers by size, text in the reader's alphabet; null stays last in both directions. */
export type SortKey = number | string | null;

export interface Column<T> {
  id: string;
  header: string;
  /** A quiet second line in the head: a unit, a level. */
  unit?: string;
  cell: (row: T) => ReactNode;
  /** Makes the column sortable. */
  sortBy?: (row: T) => SortKey;
  /** Right-aligned, tabular figures. */
  numeric?: boolean;
  /** The cell that names its row. One a table. */
  rowHeader?: boolean;
  /** Kept on one line. */
  nowrap?: boolean;
}

const features = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel(), sortFns: {} });

const compare = (a: unknown, b: unknown): number =>
  typeof a === 'number' && typeof b === 'number' ? a - b : String(a).localeCompare(String(b), 'en', { numeric: true });

const toDef = <T extends object>(column: Column<T>): ColumnDef<typeof features, T, unknown> => ({
  id: column.id,
  // undefined is what the sorted model keeps last
  accessorFn: (row: T) => column.sortBy?.(row) ?? undefined,
  enableSorting: column.sortBy !== undefined,
  sortFn: (a, b, id) => compare(a.getValue(id), b.getValue(id)),
  sortUndefined: 'last',
  sortDescFirst: false,
});

const ariaSort = (direction: false | 'asc' | 'desc') => (direction === 'asc' ? 'ascending' : direction === 'desc' ? 'descending' : 'none');

interface DataTableProps<T> {
  caption: ReactNode;
  /** Keeps the caption for screen readers only. */
  captionHidden?: boolean;
  columns: readonly Column<T>[];
  rows: readonly T[];
  rowKey: (row: T) => string;
  rowClass?: (row: T) => string | undefined;
  tight?: boolean;
  /** On a phone each row becomes a short list, label before value; otherwise the table scrolls sideways. */
  stack?: boolean;
  initialSort?: { id: string; desc: boolean };
  /** Name of the scrolling region where the caption is more than text. */
  region?: string;
}

/** A table with caption and scopes; sortable columns have a button in their head and say their order. */
export function DataTable<T extends object>({ caption, captionHidden = false, columns, rows, rowKey, rowClass, tight = false, stack = true, initialSort, region }: DataTableProps<T>) {
  const [sorting, setSorting] = useState<SortingState>(initialSort ? [initialSort] : []);
  const defs = useMemo(() => columns.map(toDef), [columns]);
  const data = useMemo(() => [...rows], [rows]);
  const table = useTable({ features, columns: defs, data, state: { sorting }, onSortingChange: setSorting, enableMultiSort: false, enableSortingRemoval: false, getRowId: rowKey });
  const body = table.getRowModel().rows;
  const className = [tight ? 'tight' : '', stack ? 'stack' : ''].filter(Boolean).join(' ');
  const head = (column: Column<T>) => {
    const model = table.getColumn(column.id);
    const words = <>{column.header}{column.unit ? <span className="unit">{column.unit}</span> : null}</>;
    if (!column.sortBy || !model) return <th key={column.id} {...r.columnHead} scope="col" className={column.numeric ? 'n' : undefined}>{words}</th>;
    const direction = model.getIsSorted();
    return (
      <th key={column.id} {...r.columnHead} scope="col" className={column.numeric ? 'n' : undefined} aria-sort={ariaSort(direction)}>
        <button type="button" className="sorter" data-order={direction || undefined} onClick={() => model.toggleSorting(direction === 'asc')}>{words}</button>
      </th>
    );
  };
  const cell = (column: Column<T>, row: T) => {
    const className = [column.numeric ? 'n' : '', column.nowrap ? 'nowrap' : ''].filter(Boolean).join(' ') || undefined;
    if (column.rowHeader) return <th key={column.id} {...r.rowHead} scope="row" className={className ? `row ${className}` : 'row'}>{column.cell(row)}</th>;
    return <td key={column.id} {...r.cell} data-l={column.header} className={className}>{column.cell(row)}</td>;
  };
  const drawn = (
    <table className={className || undefined} {...r.table}>
      <caption className={captionHidden ? 'unseen' : undefined}>{caption}</caption>
      <thead {...r.group}><tr {...r.row}>{columns.map(head)}</tr></thead>
      <tbody {...r.group}>
        {body.map((row) => <tr key={row.id} {...r.row} className={rowClass?.(row.original)}>{columns.map((column) => cell(column, row.original))}</tr>)}
      </tbody>
    </table>
  );
  return stack ? drawn : <div {...scrollRegion(region ?? (typeof caption === 'string' ? caption : 'Table'))}>{drawn}</div>;
}
