import spdxIds from 'spdx-license-ids/index.json' with { type: 'json' };
import type { Faults } from '#shared/formats/faults.ts';
import { instantOf } from '#shared/formats/instant.ts';
import { isOrcid, orcidCheckDigit } from '#shared/formats/orcid.ts';
import { shown } from '#shared/formats/pointer.ts';
import type { Dataset } from '#shared/formats/types.ts';

const licences: ReadonlySet<string> = new Set(spdxIds);
const byLowerCase: ReadonlyMap<string, string> = new Map(spdxIds.map((id) => [id.toLowerCase(), id]));

export function checkLicence(licence: string, faults: Faults): void {
  if (licences.has(licence)) return;
  const meant = byLowerCase.get(licence.toLowerCase());
  faults.add(['licence'], `${shown(licence)} is not an SPDX licence id${meant ? `; the id is written "${meant}"` : ''}.`);
}

export function checkContributors(contributors: Dataset['contributors'], faults: Faults): void {
  contributors.forEach(({ orcid }, i) => {
    if (orcid === undefined || isOrcid(orcid)) return;
    const expected = orcidCheckDigit(orcid.replaceAll('-', '').slice(0, 15));
    faults.add(['contributors', i, 'orcid'], `${shown(orcid)} is not an ORCID iD: its last character should be ${expected} (ISO 7064 MOD 11-2). A digit is mistyped.`);
  });
}

export function checkTimes({ startedAt, endedAt }: Dataset['acquisition'], faults: Faults): void {
  const [start, end] = [instantOf(startedAt), instantOf(endedAt)];
  if (start === null) faults.add(['acquisition', 'startedAt'], `${shown(startedAt)} is no date and time of the calendar.`);
  if (end === null) faults.add(['acquisition', 'endedAt'], `${shown(endedAt)} is no date and time of the calendar.`);
  if (start !== null && end !== null && end < start) faults.add(['acquisition', 'endedAt'], `${shown(endedAt)} lies before startedAt, ${shown(startedAt)}.`);
}
