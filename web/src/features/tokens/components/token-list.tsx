import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { TokenView } from '#shared/contracts/session.ts';
import { EmptyState } from '#web/components/blank-state.tsx';
import { Confirm } from '#web/components/confirm.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Message } from '#web/components/message.tsx';
import { When } from '#web/components/when.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { revokeToken, tokensQuery } from '../api/tokens.ts';

/** The live tokens of an organisation, each with its revocation. */
export function TokenList({ tokens, organisation }: { tokens: readonly TokenView[]; organisation: string }) {
  const client = useQueryClient();
  const revoke = useMutation({ mutationFn: revokeToken, onSuccess: () => client.invalidateQueries({ queryKey: tokensQuery(organisation).queryKey }) });
  if (tokens.length === 0) {
    return <EmptyState title="No token yet">A token lets a program submit datasets and read your run sheets without a person at the screen.</EmptyState>;
  }
  const columns: readonly Column<TokenView>[] = [
    { id: 'name', header: 'Token', rowHeader: true, cell: (t) => <>{t.name}<span className="sub"><code>{t.hint}</code></span></>, sortBy: (t) => t.name },
    { id: 'by', header: 'Made by', cell: (t) => t.createdBy, sortBy: (t) => t.createdBy },
    { id: 'made', header: 'Made', nowrap: true, cell: (t) => <When at={t.createdAt} />, sortBy: (t) => t.createdAt },
    { id: 'used', header: 'Last used', nowrap: true, cell: (t) => (t.lastUsedAt ? <When at={t.lastUsedAt} /> : 'never'), sortBy: (t) => t.lastUsedAt },
    {
      id: 'revoke', header: 'Revoke',
      cell: (t) => <Confirm ask="Revoke" about={t.name} act="Yes, revoke it" busy={revoke.isPending && revoke.variables === t.id} onConfirm={() => revoke.mutate(t.id)}>Whatever uses it is refused from then on. It cannot be brought back.</Confirm>,
    },
  ];
  return (
    <>
      {revoke.isError ? <Message kind="fault" live>{asApiError(revoke.error).message}</Message> : null}
      <DataTable caption="Tokens" captionHidden columns={columns} rows={tokens} rowKey={(t) => t.id} />
    </>
  );
}
