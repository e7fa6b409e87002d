import { queryOptions } from '@tanstack/react-query';
import { tokenCreated, tokenList, type TokenCreated } from '#shared/contracts/session.ts';
import { apiDo, apiGet, apiSend } from '#web/lib/api-client.ts';

const address = '/api/v1/tokens';

export const tokensQuery = (organisation: string) =>
  queryOptions({ queryKey: ['tokens', organisation], queryFn: ({ signal }) => apiGet(address, tokenList, { query: { organisation }, signal }) });

/** The answer holds the secret, once. */
export const createToken = (token: { name: string; organisation: string }): Promise<TokenCreated> => apiSend('POST', address, tokenCreated, { json: token });
export const revokeToken = (id: string): Promise<void> => apiDo('DELETE', `${address}/${id}`);
