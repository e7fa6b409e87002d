import type { ReactNode } from 'react';
import { Section } from '#web/components/section.tsx';
import { outline, sectionNumber, type SectionId } from '../outline.ts';

/** One section of the method page; its number in the margin is its address. */
export function Part({ id, aside, notes, children }: { id: SectionId; aside?: string; notes?: ReactNode; children: ReactNode }) {
  const title = outline.find((section) => section.id === id)?.title ?? id;
  return (
    <Section id={id} title={title} className="flow" notes={notes} aside={<><a href={`#${id}`}>Section {sectionNumber(id)}</a>{aside ? <><br />{aside}</> : null}</>}>
      {children}
    </Section>
  );
}

/** "section 5" as a link. */
export function PartLink({ id }: { id: SectionId }) {
  return <a href={`#${id}`} className="nowrap">section {sectionNumber(id)}</a>;
}
