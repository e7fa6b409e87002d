/**
 * Roles to spread on the parts of a table that is re-laid as a grid or a list on narrow screens: with
 * another `display` a browser forgets that it is a table, and a screen reader with it.
 */
export const tableRoles = {
  table: { role: 'table' },
  group: { role: 'rowgroup' },
  row: { role: 'row' },
  columnHead: { role: 'columnheader' },
  rowHead: { role: 'rowheader' },
  cell: { role: 'cell' },
} as const;

/** A region that scrolls sideways must be reachable by keyboard. */
export const scrollRegion = (label: string) => ({ className: 'scroll', tabIndex: 0, role: 'region', 'aria-label': label }) as const;
