import { describe, expect, it } from 'vitest';
import { chooseAxes } from '../../src/night/axes.js';

const axes = (blue: string, red: string, band: string) => ({ colour: { blue, red }, band });

describe('the axes of the diagram', () => {
  it.each([
    [['U', 'B', 'V', 'G', 'BP', 'RP'], axes('B', 'V', 'V')],
    [['V', 'G', 'BP', 'RP'], axes('BP', 'RP', 'G')],
    [['u', 'g', 'r', 'i'], axes('g', 'r', 'r')],
    [['V', 'Ic'], axes('V', 'Ic', 'V')],
    [['gP1', 'rP1'], axes('gP1', 'rP1', 'rP1')],
    [['J', 'H', 'Ks'], axes('J', 'Ks', 'J')],
  ] as const)('%j', (measured, expected) => {
    expect(chooseAxes(measured, [])).toEqual(expected);
  });

  it('with one band so far, those that the profile expects', () => {
    expect(chooseAxes(['r'], ['g', 'r'])).toEqual(axes('g', 'r', 'r'));
  });

  it('a colour without the band of its absolute magnitude is passed over', () => {
    expect(chooseAxes(['BP', 'RP', 'V', 'Ic'], [])).toEqual(axes('V', 'Ic', 'V'));
  });
});
