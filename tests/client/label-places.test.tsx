import { describe, expect, it } from 'vitest';
import { labelPlaces } from '../../src/components/charts/label-places';

const AREA = { left: 0, right: 400, top: 0, bottom: 200 };

describe('names beside marks', () => {
  it('stand to the right where there is room', () => {
    expect(labelPlaces([{ id: 'a', name: 'R42', x: 100, y: 100 }], AREA).get('a')).toEqual({
      x: 110,
      y: 100,
      anchor: 'start',
    });
  });

  it('do not cover a mark beside them, nor its name', () => {
    const places = labelPlaces(
      [
        { id: 'a', name: 'Tarnlow TZ-54', x: 200, y: 100 },
        { id: 'b', name: 'Tarnlow TZ-48', x: 230, y: 96 },
      ],
      AREA,
    );
    expect(places.get('a')).toEqual({ x: 190, y: 100, anchor: 'end' });
    expect(places.get('b')).toEqual({ x: 240, y: 96, anchor: 'start' });
  });

  it('keep within the plot at its right edge and on its floor', () => {
    const places = labelPlaces(
      [
        { id: 'edge', name: 'Tarnlow TZ-48', x: 380, y: 100 },
        { id: 'floor', name: 'Greyhollow S22', x: 150, y: 200 },
      ],
      AREA,
    );
    expect(places.get('edge')).toEqual({ x: 370, y: 100, anchor: 'end' });
    expect(places.get('floor')).toEqual({ x: 150, y: 185, anchor: 'middle' });
  });
});
