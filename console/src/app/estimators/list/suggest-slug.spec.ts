import { slugPattern, suggestSlug } from './suggest-slug';

describe('a suggested public name', () => {
  it.each([
    ['Refit labour', 'refit-labour'],
    ['  Crane time (minutes) ', 'crane-time-minutes'],
    ['Mât & gréement', 'mat-and-greement'],
    ['—', ''],
  ])('%s becomes %s', (name, slug) => {
    expect(suggestSlug(name)).toBe(slug);
  });

  it('never ends in a dash where it was cut', () => {
    const slug = suggestSlug(`${'a'.repeat(63)} b`);
    expect(slug).toBe('a'.repeat(63));
    expect(slugPattern.test(slug)).toBe(true);
  });
});
