/** The addresses of all pages, as the client's routes have them: `:name` stands for one part, a question mark for one that may be missing. */
export const pagePatterns = [
  '/', '/find', '/boards', '/boards/:gateClass/:version', '/entries/:accession', '/entries/:accession/v/:n', '/devices', '/devices/:id', '/method', '/log', '/schema', '/problems/:code',
  '/desk', '/desk/run-sheets', '/desk/run-sheets/new', '/desk/run-sheets/:id', '/desk/submissions', '/desk/submissions/new', '/desk/submissions/:id', '/desk/devices', '/desk/tokens',
  '/review/withdrawals', '/review/:id?',
  '/steward', '/steward/campaigns', '/steward/campaigns/:id', '/steward/jobs', '/steward/mail', '/steward/people',
] as const;

const partsOf = (path: string): string[] => path.split('/').filter((part) => part !== '');
const patterns: readonly string[][] = pagePatterns.map(partsOf);

const fits = (pattern: readonly string[], path: readonly string[]): boolean => {
  const least = pattern.filter((part) => !part.endsWith('?')).length;
  if (path.length < least || path.length > pattern.length) return false;
  return path.every((part, i) => pattern[i]?.startsWith(':') === true || pattern[i]?.toLowerCase() === part.toLowerCase());
};

/** Whether some page has this address. A slash at the end and letter case make no difference, as in the client. */
export const isPageAddress = (path: string): boolean => {
  const parts = partsOf(path);
  return patterns.some((pattern) => fits(pattern, parts));
};
