import { render, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { computingOpinions, failedOpinions, opinionsFixture } from '#tests/support/fixtures/opinions.ts';
import { opinionPolling, secondsWords } from '#web/components/opinions/opinion-words.ts';
import { OpinionsView } from '#web/components/opinions/opinions-view.tsx';

const naming = { gate: (label: string) => `gate ${label}`, qubits: (q: readonly number[]) => `q${q.join()}` };
const draw = (data: typeof opinionsFixture) => render(<OpinionsView data={data} naming={naming} />);

describe('second opinions', () => {
  it('stand figure by figure beside the official value, with their distance in its standard errors', () => {
    draw(opinionsFixture);
    const table = screen.getByRole('table', { name: /^Figures by each route/ });
    const row = within(table).getByRole('row', { name: /^Retained signal, depth 16/ });
    expect(within(row).getAllByRole('cell').map((c) => c.textContent)).toEqual(['0.9172', '0.9094−1.9 s.e.', '0.9056−2.9 s.e.', expect.stringMatching(/^0\.\d{4}[+−]\d\.\d s\.e\.$/), expect.stringMatching(/^0\.\d{4}/)]);
    expect(within(table).getByRole('row', { name: /^Gate loss, gate a/ })).toBeTruthy();
    expect(within(within(table).getByRole('row', { name: /^Readout loss/ })).getByText('not defined')).toBeTruthy();
  });

  it('tell route by route what they do, their error on sealed circuits and their time; a route that is not offered tells why', () => {
    draw(opinionsFixture);
    const table = screen.getByRole('table', { name: /^Routes/ });
    expect(within(table).getAllByRole('rowheader').map((h) => h.textContent)).toEqual(['M1, the official estimate', 'Single pass', 'Process tomography, SPAM taken as ideal', 'Maximum likelihood', 'Maximum likelihood, completely positive', 'Structured analysis', 'Ideal device']);
    const likely = within(table).getByRole('row', { name: /^Maximum likelihood Of all/ });
    expect(likely.textContent).toMatch(/Converged in \d+ iterations; log-likelihood \+\d+\.\d against the official estimate\./);
    expect(within(table).getByRole('row', { name: /^Structured analysis/ }).textContent).toMatch(/Not offered\. Offered for structured run sheets/);
  });

  it('say that they wait, how far they are, why they failed, or that none were made', () => {
    const { rerender } = draw({ ...computingOpinions, state: 'waiting', fraction: 0 });
    expect(screen.getByRole('status').textContent).toMatch(/^They wait their turn/);
    rerender(<OpinionsView data={computingOpinions} naming={naming} />);
    expect(screen.getByRole('progressbar').getAttribute('aria-valuenow')).toBe('40');
    rerender(<OpinionsView data={failedOpinions} naming={naming} />);
    expect(screen.getByText(/They could not be computed: its worker died\./)).toBeTruthy();
    rerender(<OpinionsView data={{ ...computingOpinions, state: 'none' }} naming={naming} />);
    expect(screen.getByRole('heading', { name: 'None were made' })).toBeTruthy();
  });

  it('are asked for again only while they are coming', () => {
    expect((['none', 'waiting', 'computing', 'done', 'failed'] as const).map(opinionPolling)).toEqual([false, 4000, 4000, false, false]);
    expect([0.412, 2.04, 38.2].map(secondsWords)).toEqual(['0.41\u202fs', '2.0\u202fs', '38\u202fs']);
  });
});
