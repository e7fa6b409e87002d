import { capitalise, countInWords, plural } from '#shared/domain/format.ts';
import { limits } from '#shared/formats/limits.ts';

/** Faults of a file, each with its place (a JSON Pointer) and a sentence. */
export function FaultTable({ name, faults }: { name: string; faults: readonly { pointer: string; message: string }[] }) {
  const many = faults.length >= limits.errors;
  return (
    <table className="tight faulttable">
      <caption>{name}: {many ? `the first ${limits.errors} faults` : `${countInWords(faults.length)} ${plural(faults.length, 'fault')}`}</caption>
      <thead><tr><th scope="col">Place</th><th scope="col">Fault</th></tr></thead>
      <tbody>
        {faults.map(({ pointer, message }, i) => (
          <tr key={i}><td>{pointer === '' ? 'the whole file' : <code>{pointer}</code>}</td><td>{capitalise(message)}</td></tr>
        ))}
      </tbody>
    </table>
  );
}
