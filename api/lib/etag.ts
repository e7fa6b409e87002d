/** Does If-None-Match name this tag, or any? */
export const isSame = (etag: string, ifNoneMatch: string | undefined): boolean =>
  ifNoneMatch?.split(',').some((tag) => tag.trim().replace(/^W\//, '') === etag || tag.trim() === '*') ?? false;
