/** Properties that the page's style sheet gives to a drawing and that a file of its own must carry along. */
const carried = ['fill', 'fill-opacity', 'stroke', 'stroke-width', 'stroke-dasharray', 'stroke-linejoin', 'vector-effect', 'font-family', 'font-size', 'font-weight', 'font-style', 'text-anchor', 'overflow', 'visibility'] as const;
const namespace = 'http://www.w3.org/2000/svg';

/** Room round the plot for the words of its axes, in pixels. */
const plotMargin = { top: 64, right: 72, bottom: 56, left: 84 };

const carryStyles = (drawn: Element, copy: Element): void => {
  const computed = getComputedStyle(drawn);
  copy.setAttribute('style', carried.map((name) => `${name}:${computed.getPropertyValue(name)}`).join(';'));
  copy.removeAttribute('class');
  copy.removeAttribute('tabindex');
  [...drawn.children].forEach((child, i) => {
    const twin = copy.children[i];
    if (twin) carryStyles(child, twin);
  });
};

/** A drawing of the page as a file of its own: same look and theme, no style sheet needed, titled. */
export function standaloneSvg(drawn: SVGSVGElement, title: string, margin = plotMargin): string {
  const { width, height } = drawn.getBoundingClientRect();
  const copy = drawn.cloneNode(true) as SVGSVGElement;
  carryStyles(drawn, copy);
  copy.setAttribute('x', String(margin.left));
  copy.setAttribute('y', String(margin.top));
  copy.setAttribute('width', String(width));
  copy.setAttribute('height', String(height));
  const whole = document.createElementNS(namespace, 'svg');
  const [w, h] = [width + margin.left + margin.right, height + margin.top + margin.bottom];
  whole.setAttribute('viewBox', `0 0 ${w} ${h}`);
  whole.setAttribute('width', String(w));
  whole.setAttribute('height', String(h));
  const name = document.createElementNS(namespace, 'title');
  name.textContent = title;
  const ground = document.createElementNS(namespace, 'rect');
  ground.setAttribute('width', '100%');
  ground.setAttribute('height', '100%');
  ground.setAttribute('fill', getComputedStyle(document.body).backgroundColor);
  const heading = document.createElementNS(namespace, 'text');
  const ink = getComputedStyle(document.body).color;
  heading.textContent = title;
  for (const [key, value] of Object.entries({ x: '16', y: '26', fill: ink, 'font-family': 'sans-serif', 'font-size': '15', 'font-weight': '600' })) heading.setAttribute(key, value);
  whole.append(name, ground, heading, copy);
  return `<?xml version="1.0" encoding="UTF-8"?>\n${new XMLSerializer().serializeToString(whole)}`;
}
