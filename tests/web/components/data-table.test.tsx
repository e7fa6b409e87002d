import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { DataTable, type Column } from '#web/components/data-table.tsx';

interface Row { name: string; value: number | null }
const rows: Row[] = [{ name: 'Tarn-10', value: 2 }, { name: 'Tarn-9', value: null }, { name: 'Quill-7', value: -1 }];
const columns: Column<Row>[] = [
  { id: 'name', header: 'Device', rowHeader: true, cell: (r) => r.name, sortBy: (r) => r.name },
  { id: 'value', header: 'Estimate', numeric: true, cell: (r) => r.value ?? 'none', sortBy: (r) => r.value },
  { id: 'plain', header: 'Remark', cell: () => 'x' },
];
const names = (): string[] => screen.getAllByRole('rowheader').map((cell) => cell.textContent ?? '');
const head = (name: string) => screen.getByRole('columnheader', { name });

describe('a sortable table', () => {
  it('has a caption, column heads and row heads, and keeps their roles when it is re-laid', () => {
    render(<DataTable caption="Boards" columns={columns} rows={rows} rowKey={(r) => r.name} />);
    expect(screen.getByRole('table', { name: 'Boards' }).getAttribute('role')).toBe('table');
    expect(screen.getAllByRole('columnheader').map((cell) => cell.getAttribute('scope'))).toEqual(['col', 'col', 'col']);
    expect(screen.getAllByRole('cell')[0]?.getAttribute('data-l')).toBe('Estimate');
  });

  it('says its order to assistive technology, and a column that cannot be sorted has no button', async () => {
    render(<DataTable caption="Boards" columns={columns} rows={rows} rowKey={(r) => r.name} />);
    expect(names()).toEqual(['Tarn-10', 'Tarn-9', 'Quill-7']);
    expect(head('Device').getAttribute('aria-sort')).toBe('none');
    expect(head('Remark').hasAttribute('aria-sort')).toBe(false);
    expect(within(head('Remark')).queryByRole('button')).toBeNull();
    await userEvent.click(within(head('Estimate')).getByRole('button'));
    expect(head('Estimate').getAttribute('aria-sort')).toBe('ascending');
    expect(names()).toEqual(['Quill-7', 'Tarn-10', 'Tarn-9']);
  });

  it('keeps rows without a value last in both directions', async () => {
    render(<DataTable caption="Boards" columns={columns} rows={rows} rowKey={(r) => r.name} />);
    const button = within(head('Estimate')).getByRole('button');
    await userEvent.click(button);
    await userEvent.click(button);
    expect(head('Estimate').getAttribute('aria-sort')).toBe('descending');
    expect(names()).toEqual(['Tarn-10', 'Quill-7', 'Tarn-9']);
  });

  it('sorts names by the numbers inside them, with the keyboard', async () => {
    render(<DataTable caption="Boards" columns={columns} rows={rows} rowKey={(r) => r.name} />);
    within(head('Device')).getByRole('button').focus();
    await userEvent.keyboard('{Enter}');
    expect(names()).toEqual(['Quill-7', 'Tarn-9', 'Tarn-10']);
  });

  it('a wide table scrolls in a named region that the keyboard reaches', () => {
    render(<DataTable caption="Boards" columns={columns} rows={rows} rowKey={(r) => r.name} stack={false} />);
    expect(screen.getByRole('region', { name: 'Boards' }).tabIndex).toBe(0);
  });
});
