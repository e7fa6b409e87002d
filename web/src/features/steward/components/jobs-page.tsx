import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { JobsOverview } from '#shared/contracts/office.ts';
import { Button } from '#web/components/button.tsx';
import { EmptyState } from '#web/components/blank-state.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Message } from '#web/components/message.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Progress } from '#web/components/progress.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { VisuallyHidden } from '#web/components/visually-hidden.tsx';
import { When } from '#web/components/when.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { jobsQuery, retryJob } from '../api/office.ts';
import { queueName } from '../campaign-words.ts';

type Queue = JobsOverview['queues'][number];
type Running = JobsOverview['running'][number];
type Failed = JobsOverview['failed'][number];

const queueColumns: readonly Column<Queue>[] = [
  { id: 'name', header: 'Queue', rowHeader: true, cell: (q) => queueName(q.name) },
  { id: 'waiting', header: 'Waiting', numeric: true, cell: (q) => q.waiting },
  { id: 'running', header: 'Running', numeric: true, cell: (q) => q.running },
  { id: 'later', header: 'For later', numeric: true, cell: (q) => q.later },
  { id: 'failed', header: 'Failed', numeric: true, cell: (q) => q.failed },
];
const runningColumns: readonly Column<Running>[] = [
  { id: 'queue', header: 'Job', rowHeader: true, cell: (r) => <>{queueName(r.queue)}{r.subject ? <span className="sub">{r.subject}</span> : null}</> },
  { id: 'stage', header: 'Stage', cell: (r) => r.stage ?? 'beginning' },
  { id: 'share', header: 'How far', cell: (r) => <Progress value={r.fraction} label={`${queueName(r.queue)}, ${Math.round(100 * r.fraction)} per cent`} /> },
  { id: 'attempt', header: 'Attempt', numeric: true, cell: (r) => r.attempt },
  { id: 'since', header: 'Since', nowrap: true, cell: (r) => <When at={r.startedAt} exact /> },
];

/** The job queue: counts by queue, what runs, and what failed for good, with the reason and another attempt where that helps. */
export function JobsPage() {
  const jobs = useQuery(jobsQuery());
  return (
    <Wrap>
      <PageHead slim title="Jobs" />
      <Read level={2} query={jobs} what="The job queue" loading="Loading the job queue" rows={7}>
        {({ queues, running, failed }) => (
          <>
            <Section title="Queues" aside="Read again every five seconds"><DataTable caption="Jobs by queue and state" captionHidden tight columns={queueColumns} rows={queues} rowKey={(q) => q.name} /></Section>
            <Section title="Running now">
              {running.length === 0 ? <p className="quiet">Nothing runs.</p> : <DataTable caption="Jobs that run now" captionHidden tight columns={runningColumns} rows={running} rowKey={(r) => r.id} />}
            </Section>
            <Section title="Failed" aside="Of the last hours, newest first"><FailedJobs failed={failed} /></Section>
          </>
        )}
      </Read>
    </Wrap>
  );
}

function FailedJobs({ failed }: { failed: readonly Failed[] }) {
  const client = useQueryClient();
  const retry = useMutation({ mutationFn: retryJob, onSettled: () => client.invalidateQueries({ queryKey: jobsQuery().queryKey }) });
  if (failed.length === 0) return <EmptyState title="No job has failed">A job stands here when its last attempt has failed.</EmptyState>;
  const columns: readonly Column<Failed>[] = [
    { id: 'queue', header: 'Job', rowHeader: true, cell: (f) => <>{queueName(f.queue)}{f.subject ? <span className="sub">{f.subject}</span> : null}</> },
    { id: 'reason', header: 'Reason', cell: (f) => f.reason },
    { id: 'attempts', header: 'Attempts', numeric: true, cell: (f) => f.attempts },
    { id: 'at', header: 'At', nowrap: true, cell: (f) => <When at={f.at} exact /> },
    {
      id: 'again', header: 'Again',
      cell: (f) => (f.retriable
        ? <Button busy={retry.isPending && retry.variables?.id === f.id} onClick={() => retry.mutate(f)}>Try again <VisuallyHidden>{queueName(f.queue)}</VisuallyHidden></Button>
        : <span className="quiet">Answered where it belongs</span>),
    },
  ];
  return (
    <>
      {retry.isError ? <Message kind="fault" live>{asApiError(retry.error).message}</Message> : null}
      <DataTable caption="Jobs whose last attempt failed" captionHidden columns={columns} rows={failed} rowKey={(f) => f.id} />
    </>
  );
}
