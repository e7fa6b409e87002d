import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';
import { contributor, gateClassAnswer, hedge, meadow } from '#tests/support/fixtures/desk-people.ts';
import { drawingSheet } from '#tests/support/fixtures/desk-submissions.ts';
import { answerWith, drawAt, Refusal } from '#tests/web/desk/support.tsx';
import { PlanForm } from '#web/features/run-sheets/components/plan-form.tsx';
import type { ForecastAnswer, ForecastRequest } from '#web/features/run-sheets/forecast.worker.ts';

/** Stands in for the forecast's worker: widths that fall as one over the root of the circuits. */
class ForecastStandIn {
  onmessage: ((event: { data: ForecastAnswer }) => void) | null = null;
  onerror: (() => void) | null = null;
  postMessage({ id, circuits }: ForecastRequest): void {
    for (const n of circuits) {
      const typical = 2.4 / Math.sqrt(n);
      setTimeout(() => this.onmessage?.({ data: { id, ok: true, unit: { circuits: n, rank: 31, conditionRatio: 0.15, figures: [{ key: 'retained-signal', depth: 16, gate: null, halfWidth: { typical, least: typical, most: typical } }, { key: 'angle-error', depth: null, gate: 'id', halfWidth: null }] } } }));
    }
  }
  terminate(): void { this.onmessage = null; }
}
beforeEach(() => { vi.stubGlobal('Worker', ForecastStandIn); });
afterEach(() => vi.unstubAllGlobals());

const draw = () => drawAt(<PlanForm devices={[meadow, hedge]} classes={gateClassAnswer.items} addDevice={() => <p>the form of a device</p>} />);
const post = 'POST /api/v1/run-sheets';
const retype = async (user: ReturnType<typeof userEvent.setup>, label: string, text: string): Promise<void> => {
  await user.clear(screen.getByLabelText(label));
  if (text !== '') await user.type(screen.getByLabelText(label), text);
};

describe('planning a run sheet', () => {
  it('tells cost and width while typing, and takes the cheapest plan that reaches the wanted width', async () => {
    const user = userEvent.setup();
    draw();
    await retype(user, 'Circuits', '400');
    await retype(user, 'Shots each', '1 000');
    // 500 circuits with the sealed ones; 2.4/√400/√1000
    expect((await screen.findByText(/This plan costs/)).textContent).toContain('500\u202f000 shots');
    await waitFor(() => expect(screen.getByText(/This plan costs/).textContent).toContain('±0.0038'));
    await user.type(screen.getByLabelText('Wanted half-width, retained signal at depth 16'), '0.0024');
    const take = await screen.findByRole('button', { name: 'Take the cheapest that reaches it' });
    await waitFor(() => expect((take as HTMLButtonElement).disabled).toBe(false));
    await user.click(take);
    // every number of circuits needs (2.4/0.0024)² = 1 000 000 circuit-shots: a sheet without rounding loss is cheapest
    const circuits = Number((screen.getByLabelText('Circuits') as HTMLInputElement).value.replace(/\D/g, ''));
    const shots = Number((screen.getByLabelText('Shots each') as HTMLInputElement).value.replace(/\D/g, ''));
    expect(circuits * shots).toBeGreaterThanOrEqual(1_000_000);
    expect(circuits * shots).toBeLessThan(1_010_000);
    await waitFor(() => expect(screen.getByText(/This plan costs/).textContent).toContain('That reaches the width you want.'));
  });

  it('names what the gate set does not determine', async () => {
    draw();
    expect((await screen.findByText('not determined by this gate set')).closest('tr')?.textContent).toContain('Angle error, identity');
  });

  it('asks the registry for nothing while a field is wrong, and names every fault', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ 'GET /api/v1/me': contributor, [post]: drawingSheet });
    draw();
    await retype(user, 'Circuits', '120');
    await retype(user, 'Shots each', '1.5');
    await user.click(screen.getByRole('button', { name: 'Draw this run sheet' }));
    expect(await screen.findByText('120 is below the floor of 200 for this gate class.')).toBeTruthy();
    expect(screen.getByText('Give a whole number of shots; 1.5 is not one.')).toBeTruthy();
    expect(screen.getByText('Name this qubit as your control software does.')).toBeTruthy();
    expect(screen.getByText('Three faults')).toBeTruthy();
    expect(asked).toHaveLength(0);
  });

  it('draws with one key over a retry, and goes to the sheet', async () => {
    const user = userEvent.setup();
    let tries = 0;
    const asked = answerWith({ 'GET /api/v1/me': contributor, [post]: () => { tries += 1; return tries === 1 ? new Refusal(503, 'unavailable', 'The queue does not answer.') : drawingSheet; } });
    const { router } = draw();
    await user.selectOptions(screen.getByLabelText('Device'), 'Hedge-1');
    await user.type(screen.getByLabelText('Qubit'), 'q3');
    await user.click(screen.getByRole('button', { name: 'Draw this run sheet' }));
    expect(await screen.findByText('The queue does not answer.')).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Draw this run sheet' }));
    await waitFor(() => expect(router.state.location.pathname).toBe('/desk/run-sheets/RS-000131'));
    const posts = asked.filter((call) => call.method === 'POST');
    expect(posts[0]?.body).toEqual({ device: hedge.id, gateClass: 'quarter-turn-1q/1', register: ['q3'], kind: 'random', circuits: 300, shots: 1000 });
    expect(posts[1]?.headers.get('idempotency-key')).toBe(posts[0]?.headers.get('idempotency-key'));
  });

  it('forecasts a register of three qubits too, and asks for each qubit’s name', async () => {
    const user = userEvent.setup();
    draw();
    await user.selectOptions(screen.getByLabelText('Gate class'), 'Chained CZ, three qubits');
    await waitFor(() => expect(screen.getByText(/This plan costs/).textContent).toContain('±0.0025'));
    expect(screen.getByText('31 of 240 in every pair')).toBeTruthy();
    expect(['Qubit 0', 'Qubit 1', 'Qubit 2'].every((label) => screen.getByLabelText(label))).toBe(true);
    expect((screen.getByLabelText('Circuits') as HTMLInputElement).value).toBe('900');
  });

  it('says plainly that a register of more than five qubits has no live forecast', async () => {
    const user = userEvent.setup();
    const large: GateClassSummary = { ...gateClassAnswer.items.find((c) => c.id === 'chained-cz-5q/1')!, id: 'chained-cz-7q/1', title: 'Chained CZ, seven qubits', registerSize: 7 };
    drawAt(<PlanForm devices={[meadow]} classes={[...gateClassAnswer.items, large]} addDevice={() => null} />);
    await user.selectOptions(screen.getByLabelText('Gate class'), 'Chained CZ, seven qubits');
    expect(await screen.findByText(/^There is no live forecast for this class/)).toBeTruthy();
    expect(screen.queryByLabelText('Assumed readout error')).toBeNull();
  });
});
