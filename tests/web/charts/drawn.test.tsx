import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { linearAxis } from '#web/charts/axis.ts';
import { Beam } from '#web/charts/beam.tsx';
import { DriftChart } from '#web/charts/drift-chart.tsx';
import { OwnAxisBeam, PreviewFigures } from '#web/charts/figure-beams.tsx';
import { makeFigure } from '#tests/support/fixtures/figures.ts';

const axis = linearAxis([0, 1], { pad: 0 });
const figure = makeFigure('retained-signal', 0.45, 0.105);
const { value, intervals } = figure;

describe('marks as drawn', () => {
  it('a beam: three rectangles in per cent and pixels, and the dot', () => {
    const { container } = render(<svg><Beam value={value} intervals={intervals} axis={axis} plotWidth={400} /></svg>);
    expect(container.innerHTML).toMatchInlineSnapshot(`"<svg><g class="beam"><rect x="24.42%" width="41.16%" y="-1" height="2"></rect><rect x="31.544%" width="26.912%" y="-2.5" height="5"></rect><rect x="37.918%" width="14.164%" y="-5" height="10"></rect><circle class="dot" cx="45%" cy="0" r="3.5"></circle></g></svg>"`);
  });

  it('the reader’s own beam differs by class only; a second entry has another shape in place of the dot', () => {
    const own = render(<svg><Beam value={value} intervals={intervals} axis={axis} plotWidth={400} own /></svg>).container.querySelector('g');
    expect(own?.getAttribute('class')).toBe('beam own');
    const second = render(<svg><Beam value={value} intervals={intervals} axis={axis} plotWidth={400} mark={2} /></svg>).container.querySelector('g');
    expect(second?.getAttribute('class')).toBe('beam m2');
    expect(second?.querySelector('circle')).toBeNull();
    expect(second?.querySelector('path')?.getAttribute('d')).toBe('M0 -5L5 0L0 5L-5 0Z');
  });

  it('a beam with its own axis names values of that axis', () => {
    const { container } = render(<OwnAxisBeam figure={figure} />);
    expect([...container.querySelectorAll('text')].map((t) => t.textContent)).toContain('0.4');
  });

  it('what is not determined is said in words, with the reason, and not drawn', () => {
    render(<PreviewFigures caption="Figures" rows={[{ key: 'a', name: 'Angle error, identity', figure: makeFigure('angle-error', null, 0, { reason: 'The ideal identity turns nothing.' }) }]} />);
    expect(screen.getByText('Not determined by this gate set.')).toBeTruthy();
    expect(screen.getByText('The ideal identity turns nothing.')).toBeTruthy();
    expect(document.querySelector('svg')).toBeNull();
  });
});

describe('a chart under the keyboard', () => {
  const blocks = [{ block: 1, sigmas: 0.4, circuits: 30 }, { block: 2, sigmas: -3, circuits: 30 }, { block: 3, sigmas: 1, circuits: 30 }];

  it('is one tab stop; arrow keys go from point to point, and the point in focus is read out in words', async () => {
    render(<DriftChart blocks={blocks} fileName="x" />);
    const points = screen.getAllByRole('img');
    expect(points.map((p) => p.getAttribute('tabindex'))).toEqual(['0', '-1', '-1']);
    await userEvent.tab();
    expect(document.activeElement).toBe(points[0]);
    await userEvent.keyboard('{ArrowRight}');
    expect(document.activeElement?.getAttribute('aria-label')).toBe('Block 2: \u22123.00 standard deviations, 30 circuits, outside the expected range');
    expect(document.querySelector('.readout')?.textContent).toBe('Block 2: \u22123.00 standard deviations, 30 circuits, outside the expected range');
    await userEvent.keyboard('{End}{ArrowRight}');
    expect(document.activeElement).toBe(points[2]);
    await userEvent.keyboard('{Home}');
    expect(document.activeElement).toBe(points[0]);
  });

  it('carries its sentence, and the same numbers as a table', () => {
    render(<DriftChart blocks={blocks} fileName="x" />);
    expect(document.querySelector('.says')?.textContent).toContain('This does not rule out drift inside a block.');
    expect([...document.querySelectorAll('tbody tr')].map((row) => [...row.children].map((c) => c.textContent))).toEqual([['1', '+0.40', '30'], ['2', '\u22123.00', '30'], ['3', '+1.00', '30']]);
  });
});
