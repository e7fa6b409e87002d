import { useEffect, useRef, useState } from 'react';
import type { ForecastAnswer, ForecastRequest } from './forecast.worker.ts';
import type { UnitForecast } from './unit-forecast.ts';

export interface ForecastState {
  /** What the units belong to. */
  question: string;
  /** By number of circuits. */
  units: ReadonlyMap<number, UnitForecast>;
  fault: string | null;
}

const none: ForecastState = { question: '', units: new Map(), fault: null };
const settleMs = 250;

/**
 * Forecasts for one class and readout error at several numbers of circuits, the first wanted soonest. They come in one by
 * one from a worker; a new question waits until typing has settled and drops what is left of the old one.
 */
export function useForecast(question: { gateClass: string; readoutError: number; circuits: readonly number[] } | null): ForecastState {
  const [state, setState] = useState<ForecastState>(none);
  const worker = useRef<Worker | null>(null);
  const id = useRef(0);
  useEffect(() => () => { worker.current?.terminate(); worker.current = null; }, []);

  const subject = question ? `${question.gateClass} ${question.readoutError}` : '';
  const wanted = question?.circuits.join() ?? '';
  useEffect(() => {
    if (subject === '') return;
    const timer = setTimeout(() => {
      const [gateClass = '', readoutError = ''] = subject.split(' ');
      id.current += 1;
      const own = id.current;
      worker.current ??= new Worker(new URL('./forecast.worker.ts', import.meta.url), { type: 'module' });
      worker.current.onmessage = ({ data }: MessageEvent<ForecastAnswer>) => {
        if (data.id !== own) return;
        setState((old) => {
          if (!data.ok) return { question: subject, units: new Map(), fault: data.reason };
          return { question: subject, units: new Map([...(old.question === subject ? old.units : []), [data.unit.circuits, data.unit]]), fault: null };
        });
      };
      worker.current.onerror = () => setState({ question: subject, units: new Map(), fault: 'The forecast could not be started in this browser.' });
      worker.current.postMessage({ id: own, gateClass, readoutError: Number(readoutError), circuits: wanted.split(',').map(Number) } satisfies ForecastRequest);
    }, settleMs);
    return () => clearTimeout(timer);
  }, [subject, wanted]);
  return subject !== '' && state.question === subject ? state : none;
}
