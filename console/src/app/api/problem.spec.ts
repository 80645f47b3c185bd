import { HttpErrorResponse, HttpHeaders } from '@angular/common/http';
import { errorOf, problemOf } from './problem';

const raggedFile = {
  type: '/docs/problems/file-ragged',
  title: 'A line has too many values',
  status: 422,
  code: 'file-ragged',
  detail: 'The header names 12 columns and line 48 has 13 values. Put values that hold a comma into quotes.',
  requestId: 'req-1',
  line: 48,
};

describe('problemOf', () => {
  it('reads problem details, with the line of the file', () => {
    const problem = problemOf(new HttpErrorResponse({ status: 422, error: raggedFile }));
    expect(problem).toMatchObject({ code: 'file-ragged', status: 422, line: 48, requestId: 'req-1', errors: [] });
  });

  it('reads problem details that arrive as text', () => {
    const problem = problemOf(new HttpErrorResponse({ status: 422, error: JSON.stringify(raggedFile) }));
    expect(problem.code).toBe('file-ragged');
  });

  it('says that the desk did not answer when there was no answer', () => {
    expect(problemOf(new HttpErrorResponse({ status: 0 })).code).toBe('unreachable');
  });

  it('does not trust an answer that is not a problem', () => {
    const problem = problemOf(new HttpErrorResponse({ status: 502, error: '<html>Bad gateway</html>' }));
    expect(problem.code).toBe('unreadable');
    expect(problem.detail).toContain('502');
  });

  it('takes the wait from the header when the body has none', () => {
    const headers = new HttpHeaders({ 'Retry-After': '30' });
    expect(problemOf(new HttpErrorResponse({ status: 429, error: '', headers })).retryAfter).toBe(30);
  });

  it('throws our own mistakes on', () => {
    expect(() => problemOf(new TypeError('x is not a function'))).toThrow(TypeError);
  });
});

describe('errorOf', () => {
  it('finds the complaint about a field by its pointer', () => {
    const error = {
      ...raggedFile,
      errors: [
        { detail: 'Enter a slug', pointer: '#/slug' },
        { detail: 'Too long', pointer: '#/a~1b/0' },
      ],
    };
    const problem = problemOf(new HttpErrorResponse({ status: 422, error }));
    expect(errorOf(problem, 'slug')).toBe('Enter a slug');
    expect(errorOf(problem, 'a/b/0')).toBe('Too long');
    expect(errorOf(problem, 'name')).toBeUndefined();
  });
});
