import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { useLocation } from 'react-router-dom';
import { asApiError } from '#web/lib/api-error.ts';
import { signInAddress } from '#web/lib/me.ts';
import { ClosedDoor, type HeadingLevel } from './blank-state.tsx';
import { FaultState } from './fault-state.tsx';
import { LoadingFrame } from './loading-frame.tsx';

interface ReadProps<T> {
  query: UseQueryResult<T>;
  /** "The board": subject of the fault's sentence. */
  what: string;
  /** "Loading the board". */
  loading: string;
  rows?: number;
  /** Shown for 404 and 410 in place of the usual fault. */
  missing?: ReactNode;
  /** Heading level of faults and closed doors: 2 directly on a page. */
  level?: HeadingLevel;
  children: (data: T) => ReactNode;
}

/** One read with all its states: loading, fault, sign-in wanted, closed door, missing, and the content. */
export function Read<T>({ query, what, loading, rows, missing, level = 3, children }: ReadProps<T>) {
  const { pathname, search } = useLocation();
  if (query.data !== undefined) return <>{children(query.data)}</>;
  if (query.isPending) return rows === undefined ? <LoadingFrame label={loading} /> : <LoadingFrame label={loading} rows={rows} />;
  const error = asApiError(query.error);
  if (missing && (error.status === 404 || error.status === 410)) return <>{missing}</>;
  if (error.status === 401) return <ClosedDoor level={level} title={`${what} needs you to sign in`} act={<a className="btn" href={signInAddress(pathname + search)}>Sign in</a>}>{error.message}</ClosedDoor>;
  if (error.status === 403) return <ClosedDoor level={level} title={`${what} is not open to you`} act={<a href={signInAddress(pathname + search)}>Sign in as someone else</a>}>{error.message}</ClosedDoor>;
  return <FaultState level={level} error={error} what={what} onRetry={() => void query.refetch()} />;
}
