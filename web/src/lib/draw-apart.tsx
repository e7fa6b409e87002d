import type { ReactElement } from 'react';
import { flushSync } from 'react-dom';
import { createRoot } from 'react-dom/client';

/** Draws an SVG out of sight, hands it over, and takes it away again. */
export function drawApart<T>(drawing: ReactElement, take: (svg: SVGSVGElement) => T): T | null {
  const place = document.createElement('div');
  place.className = 'unseen';
  document.body.append(place);
  const root = createRoot(place);
  flushSync(() => root.render(drawing));
  const svg = place.querySelector('svg');
  const result = svg ? take(svg) : null;
  root.unmount();
  place.remove();
  return result;
}
