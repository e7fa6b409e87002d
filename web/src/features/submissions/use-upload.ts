import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { asApiError } from '#web/lib/api-error.ts';
import { meQuery } from '#web/lib/me.ts';
import { submissionQuery, submissionsAddress } from './api/submissions.ts';
import { uploadDataset } from './api/upload-dataset.ts';
import { dropKey, keyForFile } from './idempotency.ts';

export interface Package {
  file: File;
  gzip: boolean;
  bytesSha256: string;
}

/** Where a file goes: a new submission of an organisation, or the next round of one that exists. */
export type Target = { kind: 'new'; organisation: string } | { kind: 'replace'; submission: string };

const addressOf = (target: Target): { method: 'POST' | 'PUT'; address: string; owner: string } =>
  target.kind === 'new'
    ? { method: 'POST', address: `${submissionsAddress}?organisation=${encodeURIComponent(target.organisation)}`, owner: target.organisation }
    : { method: 'PUT', address: `${submissionsAddress}/${target.submission}/dataset`, owner: target.submission };

/** A header holds no line breaks and no letters beyond Latin-1: the name travels percent-encoded (RFC 8187). */
const disposition = (name: string): string => `attachment; filename*=UTF-8''${encodeURIComponent(name).replace(/['()*]/g, (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`)}`;

/** Sends a file that has been read and found sound; on success goes to its submission. */
export function useUpload(target: Target) {
  const client = useQueryClient();
  const navigate = useNavigate();
  const [share, setShare] = useState(0);
  const stopper = useRef<AbortController | null>(null);
  const send = useMutation({
    mutationFn: async ({ file, gzip, bytesSha256 }: Package) => {
      setShare(0);
      stopper.current = new AbortController();
      const { csrfToken } = await client.fetchQuery(meQuery());
      const { method, address, owner } = addressOf(target);
      return uploadDataset({
        method, address, body: file, gzip, csrfToken, onProgress: setShare, signal: stopper.current.signal,
        headers: { 'content-disposition': disposition(file.name) }, idempotencyKey: keyForFile(sessionStorage, owner, bytesSha256),
      });
    },
    onSuccess: async (accepted, { bytesSha256 }) => {
      dropKey(sessionStorage, addressOf(target).owner, bytesSha256);
      await client.invalidateQueries({ queryKey: ['submissions'] });
      await client.invalidateQueries({ queryKey: submissionQuery(accepted.id).queryKey });
      await navigate(`/desk/submissions/${accepted.id}`);
    },
    onError: (error, { bytesSha256 }) => {
      // A refusal by name is an answer too: what was refused under this key would be refused again.
      if (asApiError(error).fault === 'problem' && asApiError(error).status < 500) dropKey(sessionStorage, addressOf(target).owner, bytesSha256);
    },
  });
  return { send, share, stop: () => stopper.current?.abort() };
}
