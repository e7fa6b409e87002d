import type { DeviceRef } from '#shared/contracts/common.ts';
import type { Device } from '#api/entities/device.ts';

/** A device with its provider, as every list shows it. The device's organisation must be loaded. */
export const presentDevice = (device: Device): DeviceRef => {
  const organisation = device.organisation.unwrap();
  return { id: device.id, name: device.name, modality: device.modality, provider: { id: organisation.slug, name: organisation.name } };
};
