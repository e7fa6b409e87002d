import type { Board } from '#shared/contracts/boards.ts';
import { plural } from '#shared/domain/format.ts';
import { Message } from '#web/components/message.tsx';
import { Select } from '#web/components/select.tsx';
import { withField } from '../board-view.ts';
import { useAddressSearch, useSetAddressSearch } from '../use-address-search.ts';

type Version = Board['methods'][number];
const labelOf = ({ id, status, results }: Version): string => `${id}, ${status}, ${results} ${plural(results, 'result')}`;

/** Which method version the board is read by; there only where entries have results by more than one. A draft says what it is. */
export function BoardMethod({ board }: { board: Board }) {
  const search = useAddressSearch();
  const setSearch = useSetAddressSearch();
  const { method, methods } = board;
  const read = methods.find((v) => v.id === method);
  const official = methods.filter((v) => v.status === 'official').at(-1);
  const options = read ? methods : [...methods, { id: method, status: 'draft' as const, results: 0 }];
  if (options.length < 2) return null;
  return (
    <section className="flow after" aria-label="Figures of which version">
      <div className="filters noprint">
        <Select label="Method version" value={method} options={options.map((v) => ({ value: v.id, label: labelOf(v) }))} onChange={(e) => setSearch(withField(search, 'method', e.target.value === official?.id ? '' : e.target.value))} />
      </div>
      {read?.status === 'official' ? null : <Message kind="caution">Draft version, not the registry’s figures; nothing is ranked by it. The frozen figures are those of {official?.id ?? 'the official version'}.</Message>}
    </section>
  );
}
