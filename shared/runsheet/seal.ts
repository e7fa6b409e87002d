import { hmac } from '@noble/hashes/hmac.js';
import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, hexToBytes, utf8ToBytes } from '@noble/hashes/utils.js';
import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { Faults } from '#shared/formats/faults.ts';
import { shown } from '#shared/formats/pointer.ts';
import type { RunSheet, Seal } from '#shared/formats/types.ts';

/** The commitment printed on a sheet: SHA-256 of the secret's bytes, hex. */
export function commitmentOf(secret: Uint8Array): string {
  return bytesToHex(sha256(secret));
}

/**
 * Ids of the `count` sealed circuits of one patch: those with the smallest HMAC-SHA256(secret, UTF-8 bytes of the id),
 * compared as bytes, ascending. The secret is independent of the seed, so whoever knows the sheet cannot tell them.
 * Cost: one HMAC a circuit and a sort.
 */
export function sealedIds(secret: Uint8Array, circuits: readonly { id: string }[], count: number): string[] {
  const tagged = circuits.map(({ id }) => ({ id, tag: bytesToHex(hmac(sha256, secret, utf8ToBytes(id))) }));
  // Equal tags would need equal ids; hex digits sort as the bytes do.
  tagged.sort((a, b) => (a.tag < b.tag ? -1 : a.tag > b.tag ? 1 : 0));
  return tagged.slice(0, count).map(({ id }) => id);
}

/** The seal of a sheet, opened: which circuits were kept out of the estimate. */
export function openSeal(sheet: RunSheet, secret: Uint8Array): Seal {
  if (sheet.id === null || sheet.sealSha256 === null) throw new RangeError('A sheet drawn offline has no seal.');
  if (commitmentOf(secret) !== sheet.sealSha256) throw new RangeError(`The secret does not belong to ${sheet.id}: its SHA-256 is not the one printed on the sheet.`);
  return {
    format: 'evenbeam.seal', formatVersion: '1.0.0', runSheet: sheet.id, secret: bytesToHex(secret), sealSha256: sheet.sealSha256,
    sealed: sheet.patches.flatMap(({ circuits, sealed }) => sealedIds(secret, circuits, sealed)),
  };
}

/** Rules of a seal by itself: the secret fits the commitment, and in each patch the sealed circuits are the first by HMAC. */
export function checkSealOnPatches(seal: Seal, patches: readonly { qubits: readonly number[]; circuits: readonly { id: string }[] }[]): ErrorDetail[] {
  const faults = new Faults();
  const secret = hexToBytes(seal.secret);
  if (commitmentOf(secret) !== seal.sealSha256) faults.add(['sealSha256'], `The SHA-256 of the secret is ${commitmentOf(secret)}, not ${seal.sealSha256}.`);
  const known = new Set(patches.flatMap(({ circuits }) => circuits.map(({ id }) => id)));
  const listed = new Set(seal.sealed);
  seal.sealed.forEach((id, i) => {
    if (!known.has(id)) faults.add(['sealed', i], `No circuit has the id ${shown(id)}.`);
  });
  for (const { circuits, qubits } of patches) {
    const own = circuits.filter(({ id }) => listed.has(id));
    if (qubits.length <= 2 && own.length > 0 && own.length === circuits.length) faults.add(['sealed'], `The seal keeps every circuit of the patch of qubits ${qubits.join(', ')}: none is left to estimate from.`);
    const chosen = new Set(sealedIds(secret, circuits, own.length));
    for (const { id } of own) {
      if (!chosen.has(id)) faults.add(['sealed', seal.sealed.indexOf(id)], `The circuit ${shown(id)} was not chosen by the secret: others of its patch have a smaller HMAC.`);
    }
  }
  return faults.list;
}

/** Does an opened seal belong to the sheet: same number, same commitment, and exactly the circuits that its secret chooses? */
export function checkSeal(seal: Seal, sheet: RunSheet): ErrorDetail[] {
  const faults = new Faults();
  if (seal.runSheet !== sheet.id) faults.add(['runSheet'], `The seal is for ${shown(seal.runSheet)}, the sheet is ${shown(sheet.id)}.`);
  if (seal.sealSha256 !== sheet.sealSha256) faults.add(['sealSha256'], `The commitment is not the one printed on the sheet, ${shown(sheet.sealSha256)}.`);
  const listed = new Set(seal.sealed);
  sheet.patches.forEach(({ circuits, sealed, qubits }) => {
    const own = circuits.filter(({ id }) => listed.has(id)).length;
    if (own !== sealed) faults.add(['sealed'], `The sheet seals ${sealed} circuits of the patch of qubits ${qubits.join(', ')}; the seal names ${own}.`);
  });
  return faults.none ? checkSealOnPatches(seal, sheet.patches) : faults.list;
}
