import '#web/styles/formulas.css';
import { render } from 'katex';
import { useLayoutEffect, useRef } from 'react';

/**
 * One formula, typeset before the first paint. It is built as nodes and not as markup: the content policy forbids
 * style attributes in markup, and allows the styles that a script sets on a node. MathML for screen readers lies beside it.
 */
export function Tex({ children, block = false }: { children: string; block?: boolean }) {
  const place = useRef<HTMLSpanElement>(null);
  useLayoutEffect(() => {
    if (place.current) render(children, place.current, { displayMode: block, output: 'htmlAndMathml', throwOnError: true });
  }, [children, block]);
  return <span ref={place} className={block ? 'tex' : 'tex inline'} />;
}
