import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState, type ReactNode } from 'react';
import { FormProvider, useForm, useWatch } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import type { DeviceSummary } from '#shared/contracts/devices.ts';
import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';
import { capitalise, countInWords, formatCount, plural } from '#shared/domain/format.ts';
import { Button } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';
import { newIdempotencyKey } from '#web/lib/api-client.ts';
import { asApiError } from '#web/lib/api-error.ts';
import { drawRunSheet } from '../api/run-sheets.ts';
import { cheapestPlan, circuitsToForecast, largestForecast } from '../plan-forecast.ts';
import { planSchema, type Plan, type PlanFields as Fields } from '../plan-schema.ts';
import { useForecast } from '../use-forecast.ts';
import { ForecastPanel } from './forecast-panel.tsx';
import { NoForecast } from './no-forecast.tsx';
import { PlanFields } from './plan-fields.tsx';

interface PlanFormProps {
  devices: readonly DeviceSummary[];
  classes: readonly GateClassSummary[];
  /** The form that adds a device; calls back with the device or to be closed. */
  addDevice: (done: { onAdded: (device: DeviceSummary) => void; onClose: () => void }) => ReactNode;
}

const startOf = (devices: readonly DeviceSummary[], first: GateClassSummary | undefined): Fields => ({
  device: devices[0]?.id ?? '', gateClass: first?.id ?? '', register: Array.from({ length: first?.registerSize ?? 1 }, () => ''), kind: 'random',
  circuits: formatCount(Math.ceil((first?.floor.circuits ?? 200) * 1.5)), shots: formatCount(1000), readoutError: '0.010', wanted: '',
});

/** Plans a sheet: the fields on the left, what they cost and buy on the right, and the draw. */
export function PlanForm({ devices, classes, addDevice }: PlanFormProps) {
  const schemas = useMemo(() => new Map(classes.map((c) => [c.id, planSchema(c)])), [classes]);
  const schemaOf = (id: string) => schemas.get(id) ?? planSchema(undefined);
  const form = useForm<Fields, unknown, Plan>({
    resolver: (values, context, options) => zodResolver(schemaOf(values.gateClass))(values, context, options),
    defaultValues: startOf(devices, classes[0]), mode: 'onTouched',
  });
  const fields = useWatch({ control: form.control }) as Fields;
  const gateClass = classes.find((c) => c.id === fields.gateClass);
  // Widths are worked out for circuits drawn gate by gate.
  const live = gateClass !== undefined && gateClass.registerSize <= largestForecast && !(gateClass.registerSize === 1 && fields.kind === 'structured');
  const [adding, setAdding] = useState(devices.length === 0);
  useClassDefaults(form, gateClass);

  // The forecast asks only for numbers: the device and the qubits' names may still be missing.
  const plan = useMemo(() => {
    const parsed = (schemas.get(fields.gateClass) ?? planSchema(undefined)).safeParse({ ...fields, device: fields.device || 'not chosen yet', register: fields.register.map((_, i) => `q${i}`) });
    return parsed.success ? parsed.data : null;
  }, [schemas, fields]);
  const question = useMemo(() => (plan && gateClass && live ? { gateClass: gateClass.id, readoutError: plan.readoutError, circuits: circuitsToForecast(gateClass, plan.circuits) } : null), [plan, gateClass, live]);
  const forecast = useForecast(question);
  // Before the whole ladder is climbed, the cheapest of what is known would change under the reader's hand.
  const climbed = question?.circuits.every((n) => forecast.units.has(n)) ?? false;
  const cheapest = useMemo(() => (climbed && plan?.wanted && gateClass ? cheapestPlan(gateClass, forecast.units.values(), plan.wanted) : null), [climbed, plan, gateClass, forecast.units]);
  const takeCheapest = (): void => {
    if (!cheapest) return;
    form.setValue('circuits', formatCount(cheapest.circuits), { shouldDirty: true, shouldValidate: true });
    form.setValue('shots', formatCount(cheapest.shotsEach), { shouldDirty: true, shouldValidate: true });
  };
  const added = (device: DeviceSummary): void => {
    setAdding(false);
    form.setValue('device', device.id, { shouldDirty: true, shouldValidate: true });
  };
  return (
    <FormProvider {...form}>
      <DrawForm form={form} side={
        <PlanFields devices={devices} classes={classes} gateClass={gateClass} live={live} onAddDevice={() => setAdding(true)}
          addDevice={adding ? addDevice({ onAdded: added, onClose: () => setAdding(false) }) : null}
          cheapest={<Button disabled={!cheapest} onClick={takeCheapest}>Take the cheapest that reaches it</Button>} />
      }>
        {plan === null || !gateClass ? <p className="opening mid quiet">The forecast stands here once circuits and shots are numbers at or above the floors of the class.</p>
          : live ? <ForecastPanel plan={plan} gateClass={gateClass} forecast={forecast} climbed={climbed} cheapest={cheapest} />
          : <NoForecast plan={plan} gateClass={gateClass} />}
      </DrawForm>
    </FormProvider>
  );
}

type PlanFormApi = ReturnType<typeof useForm<Fields, unknown, Plan>>;

/** A change of class brings its own usual numbers, unless the reader has set their own. */
function useClassDefaults({ setValue, formState: { dirtyFields } }: PlanFormApi, gateClass: GateClassSummary | undefined): void {
  const before = useRef(gateClass?.id);
  const { circuits, shots } = dirtyFields;
  useEffect(() => {
    if (!gateClass || before.current === gateClass.id) return;
    before.current = gateClass.id;
    if (!circuits) setValue('circuits', formatCount(Math.ceil(gateClass.floor.circuits * 1.5)));
    if (!shots) setValue('shots', formatCount(Math.max(1000, gateClass.floor.shots)));
  }, [gateClass, setValue, circuits, shots]);
}

/** The frame of the two columns, and the draw itself. */
function DrawForm({ form, side, children }: { form: PlanFormApi; side: ReactNode; children: ReactNode }) {
  const client = useQueryClient();
  const navigate = useNavigate();
  // One key for one plan: pressed again after a lost answer it draws no second sheet; another plan is another act.
  const act = useRef({ plan: '', key: '' });
  const draw = useMutation({
    mutationFn: (plan: Plan) => {
      const asked = { device: plan.device, gateClass: plan.gateClass, register: plan.register, kind: plan.kind, circuits: plan.circuits, shots: plan.shots };
      const text = JSON.stringify(asked);
      if (act.current.plan !== text) act.current = { plan: text, key: newIdempotencyKey() };
      return drawRunSheet({ plan: asked, key: act.current.key });
    },
    onSuccess: async (sheet) => {
      await client.invalidateQueries({ queryKey: ['run-sheets'] });
      await navigate(`/desk/run-sheets/${sheet.id}`);
    },
  });
  const faults = Object.keys(form.formState.errors).length;
  return (
    <form className="planner" noValidate onSubmit={form.handleSubmit((plan) => draw.mutate(plan))}>
      <div className="plan">{side}</div>
      <div className="forecast">
        <h2 className="unseen">Forecast</h2>
        {children}
        {faults > 0 && form.formState.isSubmitted ? <Message kind="fault" label={`${capitalise(countInWords(faults))} ${plural(faults, 'fault')}`}>Nothing was asked for. Mend the fields marked on this page.</Message> : null}
        {draw.isError ? <Message kind="fault" live>{asApiError(draw.error).message}</Message> : null}
        <div className="acts">
          <Button type="submit" kind="first" busy={draw.isPending}>{draw.isPending ? 'Asking the registry' : 'Draw this run sheet'}</Button>
          <span className="small quiet">The sheet gets a number. Which circuits are sealed is fixed then, and stays secret until the entry is frozen.</span>
        </div>
      </div>
    </form>
  );
}
