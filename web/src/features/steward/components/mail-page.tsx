import { useQuery } from '@tanstack/react-query';
import type { MailOverview } from '#shared/contracts/office.ts';
import { formatCount, plural } from '#shared/domain/format.ts';
import { EmptyState } from '#web/components/blank-state.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Message } from '#web/components/message.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { When } from '#web/components/when.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { mailQuery } from '../api/office.ts';

type Item = MailOverview['items'][number];

const columns: readonly Column<Item>[] = [
  { id: 'subject', header: 'Message', rowHeader: true, cell: (m) => <>{m.subject}<span className="sub">{m.topic} {m.topicId}</span></> },
  { id: 'to', header: 'To', cell: (m) => m.recipient },
  { id: 'queued', header: 'Owed since', nowrap: true, cell: (m) => <When at={m.queuedAt} exact /> },
  { id: 'sent', header: 'Sent', cell: (m) => (m.sentAt ? <When at={m.sentAt} exact /> : m.lastError ? `Not yet, after ${formatCount(m.attempts)} ${plural(m.attempts, 'attempt')}: ${m.lastError}` : 'Not yet') },
];

/** The outbox: what is owed and why it is not sent, then the last messages sent. */
export function MailPage() {
  const mail = useQuery(mailQuery());
  return (
    <Wrap>
      <PageHead slim title="Mail" />
      <Read level={2} query={mail} what="The outbox" loading="Loading the outbox" rows={6}>
        {({ items, waiting, failing, sent }) => (
          <Section title="Outbox" aside={`${formatCount(waiting)} owed, ${formatCount(sent)} sent`}>
            <div className="flow">
              {failing > 0 ? <Message kind="caution">{`${formatCount(failing)} ${plural(failing, 'message was', 'messages were')} tried and could not be sent. They are tried again every five minutes; nothing is lost.`}</Message> : null}
              {items.length === 0 ? <EmptyState title="No message yet">Messages stand here from the move that owes them, also before they are sent.</EmptyState> : <DataTable caption="Messages, owed ones first" captionHidden columns={columns} rows={items} rowKey={(m) => m.id} />}
            </div>
          </Section>
        )}
      </Read>
    </Wrap>
  );
}
