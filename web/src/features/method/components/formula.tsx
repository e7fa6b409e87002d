import { useEffect, useRef } from 'react';
import { formulaOf, type FormulaId } from '../formulas.ts';
import { Tex } from './tex.tsx';

const addressOf = (id: FormulaId): string => `formula-${id}`;

/** A numbered formula. Where it is wider than the page it scrolls in a box of its own, by keyboard too. */
export function Formula({ id }: { id: FormulaId }) {
  const { number, parts } = formulaOf(id);
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const element = box.current;
    if (!element || typeof ResizeObserver === 'undefined') return;
    const observer = new ResizeObserver(() => {
      if (element.scrollWidth > element.clientWidth) element.tabIndex = 0;
      else element.removeAttribute('tabindex');
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return (
    <div className="numbered" id={addressOf(id)}>
      <div ref={box} className="formulabox" role="group" aria-label={`Formula ${number}`}>{parts.map((part) => <Tex key={part} block>{part}</Tex>)}</div>
      <a className="formulano" href={`#${addressOf(id)}`} aria-label={`Address of formula ${number}`}>({number})</a>
    </div>
  );
}

/** "(9)": points to a formula elsewhere on the page. */
export function FormulaLink({ id }: { id: FormulaId }) {
  return <a href={`#${addressOf(id)}`} className="nowrap">({formulaOf(id).number})</a>;
}
