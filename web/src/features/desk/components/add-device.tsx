import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { deviceCreate, type DeviceSummary } from '#shared/contracts/devices.ts';
import { capitalise } from '#shared/domain/format.ts';
import { Button } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';
import { Select } from '#web/components/select.tsx';
import { TextField } from '#web/components/text-field.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { modalityWords } from '#web/lib/modality-words.ts';
import { addDevice, ownDevicesQuery } from '../api/own-devices.ts';

const modalityOptions = deviceCreate.shape.modality.options.map((value) => ({ value, label: capitalise(modalityWords[value]) }));

const fields = deviceCreate.omit({ organisation: true }).extend({ name: z.string().trim().min(1, 'Name the device.').max(80, 'A device name has at most 80 characters.') });

interface Props {
  organisation: string;
  /** Called with the new device once the registry has it. */
  onAdded: (device: DeviceSummary) => void;
  /** Closes the form without adding; absent = the form stays open. */
  onClose?: () => void;
}

/** Adds a device. A group of fields and not a form element, so that it can stand inside another form. */
export function AddDevice({ organisation, onAdded, onClose }: Props) {
  const client = useQueryClient();
  const { register, handleSubmit, reset, formState: { errors } } = useForm({ resolver: zodResolver(fields), defaultValues: { name: '', modality: 'superconducting' as const } });
  const add = useMutation({
    mutationFn: addDevice,
    onSuccess: async (device) => {
      reset();
      await client.invalidateQueries({ queryKey: ownDevicesQuery(organisation).queryKey });
      onAdded(device);
    },
  });
  const save = handleSubmit((device) => add.mutate({ organisation, ...device }));
  const saveOnEnter = (event: React.KeyboardEvent): void => {
    if (event.key !== 'Enter' || !(event.target instanceof HTMLInputElement)) return;
    event.preventDefault();
    void save();
  };
  return (
    <fieldset className="addbox">
      <legend>Add a device</legend>
      <TextField label="Name" autoComplete="off" error={errors.name?.message} {...register('name')} onKeyDown={saveOnEnter} />
      <Select label="Kind" options={modalityOptions} error={errors.modality?.message} {...register('modality')} />
      {add.isError ? <Message kind="fault" live>{asApiError(add.error).message}</Message> : null}
      <p className="acts">
        <Button busy={add.isPending} onClick={() => void save()}>{add.isPending ? 'Adding' : 'Add'}</Button>
        {onClose ? <Button kind="plain" onClick={onClose}>Cancel</Button> : null}
      </p>
    </fieldset>
  );
}
