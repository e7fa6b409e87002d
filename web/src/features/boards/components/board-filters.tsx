import { boardFigure, type Board } from '#shared/contracts/boards.ts';
import { Choice } from '#web/components/choice.tsx';
import { Select } from '#web/components/select.tsx';
import { wordsOfModality } from '#web/lib/modality-words.ts';
import { capitalise } from '#shared/domain/format.ts';
import { boardFigureWords, viewOf, withField, withinChoices } from '../board-view.ts';
import { useAddressSearch, useSetAddressSearch } from '../use-address-search.ts';

const figureOptions = boardFigure.options.map((value) => ({ value, label: boardFigureWords[value] }));
const anyDate = { value: '', label: 'Any date' };

/** Figure, modality, provider, last circuit and view; all of it lives in the address. */
export function BoardFilters({ filters }: { filters: Board['filters'] | undefined }) {
  const search = useAddressSearch();
  const setSearch = useSetAddressSearch();
  const view = viewOf(search);
  const set = (field: string, value: string): void => setSearch(withField(search, field, value));
  const days = [...new Set([...withinChoices, ...(view.within ? [view.within] : [])])].sort((a, b) => a - b);
  const modalities = [...new Set([...(filters?.modalities ?? []), ...(view.modality ? [view.modality] : [])])];
  const providers = filters?.providers ?? [];
  const providerOptions = view.provider && !providers.some((p) => p.id === view.provider) ? [...providers, { id: view.provider, name: view.provider }] : providers;
  return (
    <section className="bar noprint" aria-label="Filter and view">
      <div className="filters">
        <Select label="Figure" value={view.figure} options={figureOptions} onChange={(e) => set('figure', e.target.value)} />
        <Select label="Modality" value={view.modality ?? ''} options={[{ value: '', label: 'All' }, ...modalities.map((m) => ({ value: m, label: capitalise(wordsOfModality(m)) }))]} onChange={(e) => set('modality', e.target.value)} />
        <Select label="Provider" value={view.provider ?? ''} options={[{ value: '', label: 'All' }, ...providerOptions.map((p) => ({ value: p.id, label: p.name }))]} onChange={(e) => set('provider', e.target.value)} />
        <Select label="Last circuit run" value={view.within ? String(view.within) : ''} options={[anyDate, ...days.map((d) => ({ value: String(d), label: d === 365 ? 'In the last year' : `In the last ${d} days` }))]} onChange={(e) => set('within', e.target.value)} />
        <div className="viewpick"><Choice legend="View" value={search.get('view') === 'table' ? 'table' : 'drawn'} options={[{ value: 'drawn', label: 'Drawn' }, { value: 'table', label: 'Table' }]} onChange={(v) => set('view', v === 'table' ? 'table' : '')} /></div>
      </div>
    </section>
  );
}
