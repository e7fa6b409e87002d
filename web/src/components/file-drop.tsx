import { useId, useRef, useState, type DragEvent, type ReactNode } from 'react';

interface FileDropProps {
  /** Said in bold: "Drop a dataset here". */
  lead: string;
  /** Said after it, before the button's words. */
  children: ReactNode;
  accept: string;
  /** Words after the button. */
  after: ReactNode;
  onFile: (file: File) => void;
}

/** A field that takes one file: dropped on it, or chosen with a button that every keyboard reaches. */
export function FileDrop({ lead, children, accept, after, onFile }: FileDropProps) {
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const id = useId();
  const take = (files: FileList | null): void => {
    const file = files?.[0];
    if (file) onFile(file);
    if (input.current) input.current.value = '';
  };
  const drop = (event: DragEvent): void => {
    event.preventDefault();
    setOver(false);
    take(event.dataTransfer.files);
  };
  return (
    // Dropping is a second way for those with a pointer; the button inside does the same for everyone.
     
    <div className={over ? 'drop over' : 'drop'} onDragOver={(event) => { event.preventDefault(); setOver(true); }} onDragLeave={() => setOver(false)} onDrop={drop}>
      <p id={id}><b>{lead}</b>, {children} or <button type="button" className="linkish" onClick={() => input.current?.click()}>choose a file</button>. {after}</p>
      <input ref={input} type="file" className="unseen" accept={accept} tabIndex={-1} aria-labelledby={id} onChange={(event) => take(event.target.files)} />
    </div>
  );
}
