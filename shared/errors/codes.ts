/**
 * Every way in which a request or a file can be refused. The set is closed: a new code needs a status,
 * a title and a paragraph of help, or the compiler stops.
 */
interface CodeEntry {
  /** HTTP status of an answer with this code. */
  status: number;
  /** Short and the same for every case; the case itself is told in the error's message. */
  title: string;
  /** What it means and what to do, for the help page at /problems/<code>. */
  help: string;
}

export const errorCodes = {
  'invalid-request': { status: 400, title: 'The request is not as it should be', help: 'One or more fields of the request are missing or wrong. Each is named with the sentence that says what is asked for. Correct them and send the request again; nothing was changed.' },
  'malformed-json': { status: 400, title: 'The text is not readable JSON', help: 'The text breaks off, is not UTF-8, names a key twice, or holds a number that a double-precision number cannot hold. The place is given by a JSON Pointer or by line and column.' },
  'malformed-gzip': { status: 400, title: 'The compressed file cannot be unpacked', help: 'The bytes were announced or recognised as gzip but break off or are damaged. Compress the file again and send the whole of it.' },
  'missing-idempotency-key': { status: 400, title: 'The Idempotency-Key header is missing', help: 'A submission must carry an Idempotency-Key header of your choosing, so that a repeated request cannot make a second submission.' },
  'not-signed-in': { status: 401, title: 'Sign in first', help: 'This is open only to people who are signed in, or to a valid API token. A token that was revoked or has run out counts as none.' },
  'not-allowed': { status: 403, title: 'This is not open to you', help: 'You are signed in, but the thing belongs to another organisation, or your role may not do this. Ask a contributor of that organisation, or a steward.' },
  'origin-refused': { status: 403, title: 'The request came from another site', help: 'A change must be asked for from the registry’s own pages or with an API token. Open the registry’s page again and repeat the step there.' },
  'not-found': { status: 404, title: 'There is nothing here', help: 'No thing has this address or number, or it is not public. Check the number for a slip of the pen.' },
  'method-not-allowed': { status: 405, title: 'The address does not take this method', help: 'The address exists but not for this HTTP method. The Allow header lists those that it takes.' },
  'not-acceptable': { status: 406, title: 'No form that you asked for is offered', help: 'The Accept header or the format parameter names only forms that this address does not offer. The message lists the ones it does.' },
  'wrong-state': { status: 409, title: 'It is not in a state that allows this', help: 'A submission can be moved only along the steps of its life, and somebody may have moved it since you last looked. Read it again; the message names its state now.' },
  'duplicate-content': { status: 409, title: 'The same dataset is here already', help: 'A live submission or an entry holds a dataset with the same content id. Data counts once: continue with the one that exists, or cancel it first.' },
  'already-exists': { status: 409, title: 'A thing of that name is here already', help: 'Names must be unique in their place. Choose another name or use the thing that exists.' },
  'changed-meanwhile': { status: 409, title: 'Somebody changed it in the meantime', help: 'The record was changed after you had read it. Read it again, compare, and repeat your change.' },
  'idempotency-mismatch': { status: 422, title: 'The Idempotency-Key was used for something else', help: 'This key belongs to an earlier request with another body. Use a new key for a new request.' },
  withdrawn: { status: 410, title: 'The data of this entry was withdrawn', help: 'Two curators withdrew the entry and gave a public reason, which its page shows. The page and its place in the log stay; the data is not handed out.' },
  'too-large': { status: 413, title: 'It is larger than allowed', help: 'A dataset may hold at most 64 MiB when unpacked. A compressed file that would grow beyond that is stopped while it is unpacked.' },
  'unsupported-media-type': { status: 415, title: 'The kind of content is not taken here', help: 'Send application/json, compressed or not (Content-Encoding: gzip). Nothing else is taken at this address.' },
  'unusable-file': { status: 422, title: 'The file breaks the format', help: 'The file is readable JSON but breaks a rule of its format. Each fault is named by a JSON Pointer and a sentence, at most 50 at once. The schema and its guide are published with worked examples.' },
  'design-unsound': { status: 422, title: 'No sound design was found', help: 'The circuits that were drawn do not determine what the gate class can determine. Ask for more circuits; the message names the smallest number that was sound.' },
  'rate-limited': { status: 429, title: 'Too many requests', help: 'Wait for the time that the Retry-After header names, then go on more slowly.' },
  internal: { status: 500, title: 'The registry made a mistake', help: 'The fault is ours. Nothing was half-written. The message carries a number under which the fault is noted; quote it when you report it.' },
  unavailable: { status: 503, title: 'The registry cannot answer just now', help: 'It is starting, stopping, or its database does not answer. Try again in a minute; nothing of yours is lost.' },
} as const satisfies Record<string, CodeEntry>;

export type ErrorCode = keyof typeof errorCodes;

export function isErrorCode(text: string): text is ErrorCode {
  return Object.hasOwn(errorCodes, text);
}
