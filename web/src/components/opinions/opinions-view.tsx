import type { Opinions } from '#shared/contracts/opinions.ts';
import { formatCount, narrowSpace } from '#shared/domain/format.ts';
import { EmptyState } from '../blank-state.tsx';
import { Message } from '../message.tsx';
import { Progress } from '../progress.tsx';
import { OpinionFigures, OpinionRoutes, type Naming } from './opinion-tables.tsx';

/** What these are not; stands under the heading on every page that shows them. */
export const notOfficial = 'Other published routes from the same counts. They are not the registry’s figures and never stand on boards.';

/** Second opinions on one estimate, in whatever state they are. */
export function OpinionsView({ data, naming }: { data: Opinions; naming: Naming }) {
  switch (data.state) {
    case 'none': return <EmptyState title="None were made">Second opinions are made with an estimate. This one is older than they are, or there is no estimate.</EmptyState>;
    case 'waiting': return <p className="says" role="status">They wait their turn: every estimate comes first. They appear here by themselves.</p>;
    case 'computing': return (
      <div role="status">
        <p className="says">They are being computed, {formatCount(Math.round(100 * data.fraction))}{narrowSpace}% done. They appear here by themselves.</p>
        <Progress value={data.fraction} label="Second opinions" />
      </div>
    );
    case 'failed': return <Message kind="fault" label="Second opinions">They could not be computed: {data.reason}. The official figures do not depend on them.</Message>;
    case 'done': return (
      <div className="opinions">
        <OpinionFigures data={data} naming={naming} />
        <OpinionRoutes data={data} />
      </div>
    );
  }
}
