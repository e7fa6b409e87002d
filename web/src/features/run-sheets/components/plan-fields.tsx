import { useEffect, type ReactNode } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import type { DeviceSummary } from '#shared/contracts/devices.ts';
import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';
import { formatCount } from '#shared/domain/format.ts';
import { Button } from '#web/components/button.tsx';
import { Select } from '#web/components/select.tsx';
import { TextField } from '#web/components/text-field.tsx';
import { gateListWords } from '../plan-words.ts';
import { resizedRegister, type PlanFields as Fields } from '../plan-schema.ts';

interface PlanFieldsProps {
  devices: readonly DeviceSummary[];
  classes: readonly GateClassSummary[];
  gateClass: GateClassSummary | undefined;
  /** Opens the form that adds a device. */
  onAddDevice: () => void;
  /** That form, while it is open. */
  addDevice: ReactNode;
  /** Is there a forecast for this class? */
  live: boolean;
  /** The button that takes the cheapest plan. */
  cheapest: ReactNode;
}

/** The left column: what is to be run, on what, how often. */
export function PlanFields({ devices, classes, gateClass, onAddDevice, addDevice, live, cheapest }: PlanFieldsProps) {
  const { register, formState: { errors } } = useFormContext<Fields>();
  return (
    <>
      <div>
        <Select label="Device" options={devices.length === 0 ? [{ value: '', label: 'No device yet' }] : devices.map((d) => ({ value: d.id, label: d.name }))} error={errors.device?.message} {...register('device')} />
        {addDevice ?? <p className="underfield"><Button kind="plain" onClick={onAddDevice}>Add a device</Button></p>}
      </div>
      <Select label="Gate class" options={classes.map((c) => ({ value: c.id, label: c.title }))} hint={gateClass ? <GateClassHint gateClass={gateClass} /> : undefined} error={errors.gateClass?.message} {...register('gateClass')} />
      {gateClass ? <RegisterFields size={gateClass.registerSize} /> : null}
      {gateClass?.registerSize === 1 ? <Select label="Kind of sheet" options={kinds} hint={<KindHint />} {...register('kind')} /> : null}
      <div className="two-f">
        <TextField label="Circuits" inputMode="numeric" autoComplete="off" hint={gateClass ? `At least ${formatCount(gateClass.floor.circuits)}${gateClass.kind === 'chained' ? ', for each pair' : ''}` : undefined} error={errors.circuits?.message} {...register('circuits')} />
        <TextField label="Shots each" inputMode="numeric" autoComplete="off" hint={gateClass ? `At least ${formatCount(gateClass.floor.shots)}` : undefined} error={errors.shots?.message} {...register('shots')} />
      </div>
      {live ? (
        <>
          <TextField label="Assumed readout error" inputMode="decimal" autoComplete="off" hint="Used for this forecast only, never in the estimate" error={errors.readoutError?.message} {...register('readoutError')} />
          <hr />
          <TextField label="Wanted half-width, retained signal at depth 16" inputMode="decimal" autoComplete="off" hint="Of the 95 % interval; leave empty for none" error={errors.wanted?.message} {...register('wanted')} />
          <p>{cheapest}</p>
        </>
      ) : null}
    </>
  );
}

const kinds = [{ value: 'random', label: 'Random circuits' }, { value: 'structured', label: 'Structured: sequences and repeated blocks' }];

function KindHint() {
  const kind = useWatch<Fields, 'kind'>({ name: 'kind' });
  return kind === 'structured' ? <>Preparation sequence, repeated block, readout sequence. Estimated like any other, never ranked.</> : <>Drawn gate by gate, as boards ask for.</>;
}

function GateClassHint({ gateClass }: { gateClass: GateClassSummary }) {
  return <><code>{gateClass.id}</code>: {gateListWords(gateClass)}{gateClass.ranked ? '' : '. Never ranked.'}</>;
}

/** One field a qubit, in the order of the register; names already given stay when the class changes. */
function RegisterFields({ size }: { size: number }) {
  const { register, setValue, getValues, formState: { errors } } = useFormContext<Fields>();
  useEffect(() => {
    if (getValues('register').length !== size) setValue('register', resizedRegister(getValues('register'), size));
  }, [size, getValues, setValue]);
  if (size === 1) return <TextField label="Qubit" hint="As your control software names it" autoComplete="off" error={errors.register?.[0]?.message} {...register('register.0')} />;
  return (
    <fieldset className="field">
      <legend>Qubits, in the order of the register</legend>
      <div className="two-f">
        {Array.from({ length: size }, (_, i) => <TextField key={i} label={`Qubit ${i}`} autoComplete="off" error={errors.register?.[i]?.message} {...register(`register.${i}`)} />)}
      </div>
    </fieldset>
  );
}
