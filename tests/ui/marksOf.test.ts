import { describe, expect, it } from 'vitest';
import { deskRows } from '../../src/ui/desk/deskRows.ts';
import { layoutOf } from '../../src/ui/plot/layoutOf.ts';
import { marksOf } from '../../src/ui/plot/marksOf.ts';
import { analysed, candidate, feature, verdict } from './someDesk.ts';

const layout = layoutOf(1000, 500, true);
const width = (text: string) => text.length * 6;
const desk = analysed(
  feature(1, 4000.5, [candidate('[Ne III] 4000.40', 0.99)]),
  feature(2, 5007, [candidate('[O III] 5006.84', 0.98)]),
  feature(3, 5300, []),
  feature(4, 7000, [candidate('H I 6999.90', 0.9, 'permitted')]),
);

describe('marks', () => {
  it('only those in view are drawn, each over its wavelength', () => {
    const { marks } = marksOf(deskRows(desk, []), [4000, 6000], layout, width);
    expect(marks).toHaveLength(3);
    const inner = layout.width - layout.left - layout.right;
    expect(marks[1].x).toBeCloseTo(layout.left + (inner * 1007) / 2000, 6);
  });

  it('features without a name stand below all others', () => {
    const { marks } = marksOf(deskRows(desk, []), [4000, 6000], layout, width);
    expect(marks[2].y).toBeGreaterThan(marks[1].y);
    expect(marks[2].y).toBeLessThan(layout.top + layout.lanesHeight);
    expect(marks[1].y).toBeGreaterThan(layout.top);
  });

  it('a ring stands about thin-gas lines and the sign tells the verdict', () => {
    const { marks } = marksOf(deskRows(desk, [verdict(5300, { decision: 'unidentified' })]), [3900, 7100], layout, width);
    expect(marks.map((mark) => mark.ring)).toEqual(['whole', 'whole', undefined, undefined]);
    expect(marks.map((mark) => mark.standing)).toEqual(['open', 'open', 'unidentified', 'open']);
  });

  it('a label at the end of the view is moved in, not cut', () => {
    const { labels } = marksOf(deskRows(desk, []), [4000, 6000], layout, width);
    for (const { x, text } of labels) {
      expect(x - width(text) / 2).toBeGreaterThanOrEqual(layout.left);
      expect(x + width(text) / 2).toBeLessThanOrEqual(layout.width - layout.right);
    }
    expect(labels.map((label) => label.text)).toContain('[Ne III] 4000');
  });
});

describe('labels', () => {
  const crowd = Array.from({ length: 800 }, (_, k) => {
    const at = 3500 + 7.3 * k + (k % 7);
    return feature(k + 1, at, [candidate(`${k % 3 ? '[Fe III]' : 'He I'} ${at.toFixed(2)}`, 0.9, k % 3 ? 'forbidden' : 'permitted')]);
  });
  const rows = deskRows(analysed(...crowd), []);

  it('do not touch at any zoom, and the chosen feature always has one', () => {
    for (let zoom = 0; zoom < 40; zoom++) {
      const half = 3000 * 0.85 ** zoom;
      const { labels } = marksOf(rows, [5010 - half, 5010 + half], layout, width, 207);
      expect(labels.filter((label) => label.isChosen)).toHaveLength(1);
      for (const one of labels)
        for (const other of labels)
          if (one !== other && one.y === other.y)
            expect(Math.abs(one.x - other.x)).toBeGreaterThan((width(one.text) + width(other.text)) / 2);
    }
  });

  it('of intercombination lines stand by a broken ring', () => {
    const thin = candidate('C III] 1908.73', 0.9, 'forbidden');
    const name = { ...thin, transitions: thin.transitions.map((t) => ({ ...t, nature: 'intercombination' })) };
    const { marks } = marksOf(deskRows(analysed(feature(1, 1909, [name])), []), [1800, 2000], layout, width);
    expect(marks[0].ring).toBe('broken');
  });
});

describe('the panels', () => {
  it('share the height without touching, however low the window', () => {
    for (const height of [260, 400, 620, 1400]) {
      const panels = layoutOf(900, height, true);
      expect(panels.top + panels.lanesHeight).toBeLessThan(panels.spectrumTop);
      if (height >= 400) expect(panels.spectrumTop + panels.spectrumHeight).toBeLessThan(panels.residualTop);
      expect(panels.residualTop + panels.residualHeight).toBeLessThanOrEqual(height - panels.bottom);
    }
  });
});
