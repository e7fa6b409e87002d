import { Link } from 'react-router-dom';
import { versionedAccessionOf } from '#shared/domain/ids.ts';

export const entryPath = (accession: string, version: number): string => `/entries/${accession}/v/${version}`;

/** "EVB-000042.2", leading to that version. */
export function AccessionLink({ accession, version }: { accession: string; version: number }) {
  return <Link className="nowrap" to={entryPath(accession, version)}>{versionedAccessionOf(accession, version)}</Link>;
}

/** Device names do not break across lines, unless they are so long that they would leave their column. */
export const nameClass = (name: string): string => (name.length > 22 ? 'name' : 'name nowrap');
