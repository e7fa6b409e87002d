import { gateClassById } from '#shared/domain/gate-classes.ts';
import { unitForecast, type UnitForecast } from './unit-forecast.ts';

/** Forecasts off the page's thread, one number of circuits after another; what was worked out once is kept. */
declare const self: DedicatedWorkerGlobalScope;

export interface ForecastRequest {
  id: number;
  gateClass: string;
  readoutError: number;
  circuits: readonly number[];
}
export type ForecastAnswer = { id: number; ok: true; unit: UnitForecast } | { id: number; ok: false; reason: string };

const kept = new Map<string, UnitForecast>();
let latest = 0;

/** Lets a newer question be heard between two numbers of circuits. */
const breathe = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));

const answer = async ({ id, gateClass, readoutError, circuits }: ForecastRequest): Promise<void> => {
  const found = gateClassById(gateClass);
  if (!found) return void self.postMessage({ id, ok: false, reason: `This browser does not know the gate class ${gateClass}.` } satisfies ForecastAnswer);
  for (const n of circuits) {
    if (latest !== id) return;
    const name = `${gateClass} ${readoutError} ${n}`;
    const unit = kept.get(name) ?? unitForecast(found, n, readoutError);
    kept.set(name, unit);
    self.postMessage({ id, ok: true, unit } satisfies ForecastAnswer);
    await breathe();
  }
};

self.onmessage = (event: MessageEvent<ForecastRequest>) => {
  latest = event.data.id;
  void answer(event.data).catch((error: unknown) => self.postMessage({ id: event.data.id, ok: false, reason: error instanceof Error ? error.message : String(error) } satisfies ForecastAnswer));
};
