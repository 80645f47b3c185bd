const MOST_MARKS = 20;
const LONGEST_MARK = 40;

/** Marks as they are typed, parted by semicolons. */
export function marksOf(text: string): readonly string[] {
  return [
    ...new Set(
      text
        .split(';')
        .map((mark) => mark.trim())
        .filter((mark) => mark !== ''),
    ),
  ];
}

export function marksText(marks: readonly string[]): string {
  return marks.join('; ');
}

export function marksComplaint(marks: readonly string[]): string | undefined {
  if (marks.length > MOST_MARKS) return `Give ${MOST_MARKS} marks at most; these are ${marks.length}`;
  const long = marks.find((mark) => mark.length > LONGEST_MARK);
  return long && `Shorten “${long.slice(0, LONGEST_MARK)}…”: a mark has ${LONGEST_MARK} characters at most`;
}
