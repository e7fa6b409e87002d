import { useQuery, type QueryClient } from '@tanstack/react-query';
import { BlankState } from '#web/components/blank-state.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { logGrowthQuery, logHeadQuery, newestLeavesQuery } from '#web/features/log/api/log.ts';
import { CheckSection } from '#web/features/log/components/check-section.tsx';
import { GrowthChart } from '#web/features/log/components/growth-section.tsx';
import { HeadLedger } from '#web/features/log/components/head-ledger.tsx';
import { LeafTable } from '#web/features/log/components/leaf-table.tsx';

export const loader = (queryClient: QueryClient) => () => {
  void queryClient.prefetchQuery(logHeadQuery());
  void queryClient.prefetchQuery(logGrowthQuery());
  void queryClient.prefetchQuery(newestLeavesQuery());
  return null;
};

const empty = <BlankState title="No leaf yet">The log begins with the first entry that is frozen.</BlankState>;

export function Component() {
  const head = useQuery(logHeadQuery());
  const growth = useQuery(logGrowthQuery());
  const leaves = useQuery(newestLeavesQuery());
  return (
    <Wrap>
      <PageHead title="Log" opening="Every freezing and every withdrawal is one leaf of this log. Its head is signed; a leaf cannot be changed, moved or taken out without changing every later head." />
      <Section title="Newest head" aside="Keep it, and hold us to it.">
        <Read query={head} what="The head of the log" loading="Loading the head" rows={6} missing={empty}>{(h) => <HeadLedger head={h} />}</Read>
      </Section>
      <CheckSection />
      <Section title="Growth">
        <Read query={growth} what="The growth of the log" loading="Loading the growth">{(g) => <GrowthChart growth={g} />}</Read>
      </Section>
      <Section title="Newest leaves" aside={<a href="/api/v1/log/leaves?limit=200">All leaves, as JSON</a>}>
        <Read query={leaves} what="The list of leaves" loading="Loading the leaves" rows={6}>{(l) => (l.items.length > 0 ? <LeafTable leaves={l.items} /> : empty)}</Read>
      </Section>
      <Section title="Check it yourself" aside="Without our code." id="how">
        <div className="flow">
          <p className="prose">A leaf’s data are the RFC 8785 bytes of its JSON. Its hash is SHA-256 of a zero byte and the data; a node’s hash is SHA-256 of a one byte, the left hash and the right. The tree, its inclusion proofs and its consistency proofs are those of RFC 9162, section 2.1.</p>
          <pre className="cmd">{'GET /api/v1/log/head\nGET /api/v1/log/head?size=31\nGET /api/v1/log/consistency?first=31&second=45\nGET /api/v1/log/leaves?limit=200\nGET /api/v1/entries/EVB-000001/v/1/proof'}</pre>
          <p className="prose">A head proves that the log has not changed since you kept it. It does not prove that a figure is right: for that, recompute the entry.</p>
        </div>
      </Section>
    </Wrap>
  );
}
