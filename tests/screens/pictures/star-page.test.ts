import { describe, expect, it } from 'vitest';
import { starPage } from '../../../src/screens/pictures/star-page.js';
import { exposure, NOW_MS, nightView, starDetail } from '../../support/night-view.js';

describe('the page of a star', () => {
  const detail = starDetail(nightView());
  const slit = {
    ...exposure('spectrum', 4, 600),
    caution: 'slit off the parallactic angle: set it to 47 deg',
  };
  const page = (exposures: (typeof slit)[]) =>
    starPage({ ...detail, exposures }, NOW_MS, 80, 40, 'ascii').toPlainText();

  it('tells what to mind in an exposure, below the exposures and with its setup', () => {
    const lines = page([exposure('imager V', 3, 240), slit]).split('\n');
    const caution = lines.findIndex(line =>
      line.startsWith('spectrum: slit off the parallactic angle: set it'),
    );
    expect(caution).toBeGreaterThan(lines.findIndex(line => line.startsWith('spectrum  ')));
  });

  it('says nothing where there is nothing to mind', () => {
    expect(page([exposure('imager V', 3, 240)])).not.toContain('imager V:');
  });
});
