import { fireEvent, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { contributor, larkspur } from '#tests/support/fixtures/desk-people.ts';
import { answerWith, drawAt } from '#tests/web/desk/support.tsx';
import { DatasetSender } from '#web/features/submissions/components/dataset-sender.tsx';
import type { FileReading } from '#web/lib/read-dataset-file.ts';

/** Stands in for the reading worker: answers what the test says. */
let reading: FileReading;
class ReaderStandIn {
  onmessage: ((event: { data: FileReading }) => void) | null = null;
  onerror: (() => void) | null = null;
  postMessage(): void { setTimeout(() => this.onmessage?.({ data: reading })); }
  terminate(): void { this.onmessage = null; }
}

interface Sent { method: string; url: string; headers: Record<string, string>; body: unknown }
/** Stands in for the browser's upload: each send takes the next answer; "lost" = the connection broke. */
let sent: Sent[];
let answers: ({ status: number; body: unknown } | 'lost')[];
class UploadStandIn {
  upload: { onprogress: ((event: { lengthComputable: boolean; loaded: number; total: number }) => void) | null } = { onprogress: null };
  onload: (() => void) | null = null;
  onerror: (() => void) | null = null;
  onabort: (() => void) | null = null;
  status = 0;
  responseText = '';
  private readonly call: Sent = { method: '', url: '', headers: {}, body: null };
  open(method: string, url: string): void { Object.assign(this.call, { method, url }); }
  setRequestHeader(name: string, value: string): void { this.call.headers[name] = value; }
  abort(): void { this.onabort?.(); }
  send(body: unknown): void {
    this.call.body = body;
    sent.push(this.call);
    const answer = answers.shift();
    this.upload.onprogress?.({ lengthComputable: true, loaded: 50, total: 100 });
    setTimeout(() => {
      if (answer === undefined || answer === 'lost') return this.onerror?.();
      this.status = answer.status;
      this.responseText = JSON.stringify(answer.body);
      return this.onload?.();
    });
  }
}

const good: FileReading = {
  ok: true, gzip: true, contentId: 'c'.repeat(64), bytesSha256: 'd'.repeat(64),
  summary: { title: 'Spring run', gateClass: 'quarter-turn-1q/1', runSheet: 'RS-000123', provider: 'Larkspur Quantics', device: 'Meadow-5', register: ['q3'], gates: ['a'], patches: 1, circuits: 275, shots: 275_000, lengths: { shortest: 2, longest: 16 }, blocks: 8, startedAt: '2026-05-04T08:00:00Z', endedAt: '2026-05-04T09:10:00Z', contributors: ['A. Example'], licence: 'CC-BY-4.0' },
};
const accepted = { status: 202, body: { id: 'S-000218', state: 'checking', href: '/api/v1/submissions/S-000218' } };
const file = () => new File(['x'], 'meadow 5.json.gz', { type: 'application/gzip' });

beforeEach(() => {
  reading = good;
  sent = [];
  answers = [];
  sessionStorage.clear();
  vi.stubGlobal('Worker', ReaderStandIn);
  vi.stubGlobal('XMLHttpRequest', UploadStandIn);
  answerWith({ 'GET /api/v1/me': contributor });
});
afterEach(() => vi.unstubAllGlobals());

const draw = () => drawAt(<DatasetSender target={{ kind: 'new', organisation: larkspur.id }} action="Submit this dataset" />);
const choose = (container: HTMLElement): void => {
  const input = container.querySelector('input[type=file]');
  if (!input) throw new Error('no file field');
  fireEvent.change(input, { target: { files: [file()] } });
};

describe('sending a dataset', () => {
  it('lists the faults with their places and offers nothing to send', async () => {
    reading = { ok: false, errors: [{ pointer: '/licence', message: '"CC-BY" is not an SPDX licence id.' }, { pointer: '', message: 'the text breaks off' }] };
    const { container } = draw();
    choose(container);
    expect((await screen.findByText('/licence')).closest('tr')?.textContent).toContain('"CC-BY" is not an SPDX licence id.');
    expect(screen.getByText('the whole file')).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Submit this dataset' })).toBeNull();
    expect(sent).toHaveLength(0);
  });

  it('shows what was read before it sends, then goes to the submission', async () => {
    const user = userEvent.setup();
    answers = [accepted];
    const { container, router } = draw();
    choose(container);
    expect(await screen.findByText('Meadow-5 of Larkspur Quantics, qubit q3')).toBeTruthy();
    expect(sent).toHaveLength(0);
    await user.click(screen.getByRole('button', { name: 'Submit this dataset' }));
    await waitFor(() => expect(router.state.location.pathname).toBe('/desk/submissions/S-000218'));
    expect(sent[0]).toMatchObject({ method: 'POST', url: '/api/v1/submissions?organisation=larkspur-quantics', headers: { 'content-encoding': 'gzip', 'content-type': 'application/json', 'x-csrf-token': 'csrf-1', 'content-disposition': "attachment; filename*=UTF-8''meadow%205.json.gz" } });
  });

  it('keeps one idempotency key over a lost connection, so that trying again makes no second submission', async () => {
    const user = userEvent.setup();
    answers = ['lost', accepted];
    const { container, router } = draw();
    choose(container);
    await user.click(await screen.findByRole('button', { name: 'Submit this dataset' }));
    expect(await screen.findByText('Trying again is safe: this file can make only one submission.')).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Try again' }));
    await waitFor(() => expect(router.state.location.pathname).toBe('/desk/submissions/S-000218'));
    expect(sent).toHaveLength(2);
    expect(sent[0]?.headers['idempotency-key']).toMatch(/^[0-9a-f-]{36}$/);
    expect(sent[1]?.headers['idempotency-key']).toBe(sent[0]?.headers['idempotency-key']);
    expect(sessionStorage).toHaveLength(0);
  });

  it('shows the registry’s own faults with their pointers, and the twin where the data is there already', async () => {
    const user = userEvent.setup();
    const refusal = (code: string, detail: string, errors?: unknown) => ({ status: 422, body: { type: `/problems/${code}`, title: 'The file breaks the format', status: 422, detail, code, errors } });
    answers = [refusal('unusable-file', 'One fault.', [{ pointer: '/runSheet/sha256', message: 'It is not that of RS-000123.' }]), refusal('duplicate-content', 'S-000201 holds the same data.')];
    const { container } = draw();
    choose(container);
    await user.click(await screen.findByRole('button', { name: 'Submit this dataset' }));
    expect(await screen.findByText('/runSheet/sha256')).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Try again' }));
    expect((await screen.findByRole('link', { name: 'Open S-000201' })).getAttribute('href')).toBe('/desk/submissions/S-000201');
    expect(sent[1]?.headers['idempotency-key']).not.toBe(sent[0]?.headers['idempotency-key']);
  });
});
