import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { Button } from '#web/components/button.tsx';
import { Checkbox, Group, Radio } from '#web/components/check.tsx';
import { Choice } from '#web/components/choice.tsx';
import { Progress } from '#web/components/progress.tsx';
import { Select } from '#web/components/select.tsx';
import { TextArea, TextField } from '#web/components/text-field.tsx';

const described = (element: HTMLElement): string => document.getElementById(element.getAttribute('aria-describedby') ?? '')?.textContent ?? '';

describe('fields', () => {
  it('tie label, hint and error to their control; an error replaces the hint and marks it invalid', () => {
    const { rerender } = render(<TextField label="Circuits" hint="At least 200" />);
    expect(described(screen.getByLabelText('Circuits'))).toBe('At least 200');
    rerender(<TextField label="Circuits" hint="At least 200" error="120 is below the floor of 200 for this gate class." />);
    const field = screen.getByLabelText('Circuits');
    expect(described(field)).toBe('120 is below the floor of 200 for this gate class.');
    expect(field.getAttribute('aria-invalid')).toBe('true');
  });

  it('are wired alike for areas, lists and ticks', () => {
    render(<><TextArea label="Reason" error="Say why." /><Select label="Device" options={[{ value: 'a', label: 'A' }]} hint="Yours" /><Checkbox label="No tie" error="Declare it." /></>);
    expect(described(screen.getByLabelText('Reason'))).toBe('Say why.');
    expect(described(screen.getByLabelText('Device'))).toBe('Yours');
    expect(described(screen.getByLabelText('No tie'))).toBe('Declare it.');
  });

  it('radios of a group share its name, and a choice of words is a group of radios', async () => {
    const chosen = vi.fn();
    render(<><Group legend="Decide"><Radio name="d" label="Accept" /></Group><Choice legend="View" value="drawn" options={[{ value: 'drawn', label: 'Drawn' }, { value: 'table', label: 'Table' }]} onChange={chosen} /></>);
    expect(screen.getByRole('group', { name: 'Decide' })).toBeTruthy();
    await userEvent.click(screen.getByRole('radio', { name: 'Table' }));
    expect(chosen).toHaveBeenCalledWith('table');
  });

  it('a busy button keeps its place and does nothing', async () => {
    const click = vi.fn();
    const submit = vi.fn((event: { preventDefault: () => void }) => event.preventDefault());
    render(<form onSubmit={submit}><Button type="submit" busy onClick={click}>Sending</Button></form>);
    await userEvent.click(screen.getByRole('button', { name: 'Sending' }));
    expect([click.mock.calls.length, submit.mock.calls.length]).toEqual([0, 0]);
    expect(screen.getByRole('button').getAttribute('aria-busy')).toBe('true');
  });

  it('progress says how far it is, between 0 and 100', () => {
    const { rerender } = render(<Progress value={0.617} label="Replicates" />);
    expect(screen.getByRole('progressbar', { name: 'Replicates' }).getAttribute('aria-valuenow')).toBe('62');
    rerender(<Progress value={3} label="Replicates" />);
    expect(screen.getByRole('progressbar').getAttribute('aria-valuenow')).toBe('100');
  });
});
