import { splitSample } from './delimiter';
import { findHeaderLine } from './header-line';

const headerOf = (text: string): number => findHeaderLine(splitSample(text, ','));

describe('the header line', () => {
  it.each([
    ['a,b,c\n1,2,3\n4,5,6\n', 1],
    ['\n\na,b,c\n1,2,3\n', 3],
    ['Yard export\n\nMade 2026-01-02,,\na,b,c\n1,2,3\n4,5,6\n', 4],
    ['Yard export,,\na,b,c\n1,2,3\n4,5,6\n', 2],
    ['"A title\nover two lines",,\na,b,c\n1,2,3\n4,5,6\n', 3],
  ])('of %j is line %d', (text, line) => {
    expect(headerOf(text)).toBe(line);
  });

  it('stays the first line when a name or two are missing, so that these are complained about', () => {
    expect(headerOf('a,,c\n1,2,3\n4,5,6\n')).toBe(1);
  });

  it('is not a row of numbers under a line of too few names', () => {
    expect(headerOf('a,b\n1,2,3,4\n5,6,7,8\n')).toBe(1);
  });

  it('of a single column is the first line', () => {
    expect(headerOf('a\n1\n2\n')).toBe(1);
  });
});
