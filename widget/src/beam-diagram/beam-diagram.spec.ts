import { ComponentFixture, TestBed } from '@angular/core/testing';
import { BeamDiagram, BeamTablePlace } from './beam-diagram';
import { BeamEvaluation } from './contribution';

const refit: BeamEvaluation = {
  value: 512.3,
  typical: 355,
  unit: 'hours',
  scale: 'original',
  interval: { low: 440, high: 590 },
  contributions: [
    { input: 'winter', label: 'Winter booking', arm: -1.1, mass: 7.2, contribution: -7.92 },
    { input: 'displacement', label: 'Displacement', arm: 1.4, mass: 93.9, contribution: 131.5 },
    { input: 'built', label: 'Year built', arm: -1.6, mass: 21, contribution: 33.6, float: true },
    { input: 'rig', label: 'Rig', arm: 0, mass: 0, contribution: 0 },
  ],
};

async function show(
  inputs: Partial<{
    evaluation: BeamEvaluation;
    table: BeamTablePlace;
    caseTexts: Record<string, string>;
    width: number;
  }>,
): Promise<ComponentFixture<BeamDiagram>> {
  const fixture = TestBed.createComponent(BeamDiagram);
  for (const [name, value] of Object.entries({ evaluation: refit, locale: 'en-GB', ...inputs })) {
    fixture.componentRef.setInput(name, value);
  }
  await fixture.whenStable();
  return fixture;
}

function host(fixture: ComponentFixture<BeamDiagram>): HTMLElement {
  return fixture.nativeElement as HTMLElement;
}

function rowsOf(element: HTMLElement): string[][] {
  return [...element.querySelectorAll('tbody tr, tfoot tr')].map((row) =>
    [...row.querySelectorAll('th, td')].map((cell) =>
      (cell.textContent ?? '').replace(/[\s\u00a0\u202f]+/g, ' ').trim(),
    ),
  );
}

describe('BeamDiagram', () => {
  it('names and describes its picture', async () => {
    const svg = host(await show({})).querySelector('svg');
    const byId = (attribute: string): string =>
      svg?.querySelector(`#${svg.getAttribute(attribute) ?? 'none'}`)?.textContent ?? '';
    expect(svg?.getAttribute('role')).toBe('img');
    expect(byId('aria-labelledby')).toContain('what moved the estimate');
    expect(byId('aria-describedby')).toContain('Displacement raises it');
  });

  it('gives each picture on a page its own ids', async () => {
    const [one, other] = [await show({}), await show({})].map((fixture) => host(fixture).querySelector('title')?.id);
    expect(one).not.toBe(other);
  });

  it('draws each input that has mass, with its figure and shape', async () => {
    const groups = [...host(await show({})).querySelectorAll('g[data-input]')];
    expect(groups.map((group) => group.getAttribute('data-input')).sort()).toEqual(['built', 'displacement', 'winter']);
    const built = groups.find((group) => group.getAttribute('data-input') === 'built');
    expect(built?.getAttribute('data-hangs')).toBe('float');
    expect(built?.querySelector('rect')?.getAttribute('stroke-dasharray')).toBeTruthy();
    expect(built?.querySelector('text')?.textContent?.trim()).toBe('+34');
  });

  it('tables every input, the largest first, with the sum and both ends', async () => {
    const element = host(await show({ caseTexts: { displacement: '9.8 t', built: '1974', winter: 'yes' } }));
    expect(rowsOf(element)).toEqual([
      ['Displacement', '9.8 t', '+1.4', '94', '+132'],
      ['Year built', '1974', '−1.6', '21 ↑, lifts', '+34'],
      ['Winter booking', 'yes', '−1.1', '7', '−8'],
      ['Rig', '–', '0.0', '0', '0'],
      ['Typical case', '355'],
      ['All inputs together', '+157'],
      ['This case', '512'],
    ]);
  });

  it('leaves out the column of the case where its readings are not given', async () => {
    const element = host(await show({}));
    expect([...element.querySelectorAll('thead th')].map((cell) => cell.textContent?.trim())).toEqual([
      'Input',
      'Arm',
      'Mass',
      'Moves by, hours',
    ]);
  });

  it('shows both the logarithm and the factor on the log scale', async () => {
    const contribution = Math.log(512.3 / 355);
    const logged: BeamEvaluation = {
      ...refit,
      scale: 'log',
      contributions: [
        { input: 'displacement', label: 'Displacement', arm: 1.4, mass: contribution / 1.4, contribution },
      ],
    };
    const element = host(await show({ evaluation: logged }));
    expect(rowsOf(element)).toEqual([
      ['Displacement', '+1.4', '0.262', '+0.367', '× 1.44'],
      ['Typical case', '', '355 hours'],
      ['All inputs together', '+0.367', '× 1.44'],
      ['This case', '', '512 hours'],
    ]);
    expect(element.querySelector('g[data-input] text')?.textContent?.trim().replace(/\s/g, ' ')).toBe('× 1.44');
  });

  it('is a picture alone for a printed sheet', async () => {
    const element = host(await show({ table: 'none', width: 620 }));
    expect(element.querySelector('table')).toBeNull();
    expect(element.querySelector('svg')?.getAttribute('viewBox')).toMatch(/^0 0 620 /);
  });

  it('folds the table away when asked to', async () => {
    expect(host(await show({ table: 'folded' })).querySelector('details table')).not.toBeNull();
  });

  it('follows a new case', async () => {
    const fixture = await show({});
    fixture.componentRef.setInput('evaluation', { ...refit, contributions: refit.contributions.slice(1, 2) });
    await fixture.whenStable();
    expect(host(fixture).querySelectorAll('g[data-input]')).toHaveLength(1);
  });

  it('puts no style element and no style attribute into the page', async () => {
    const element = host(await show({}));
    expect(element.querySelectorAll('style, [style]')).toHaveLength(0);
  });
});
