import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { ReferenceSearch } from './reference-search';
import { controlOf, named } from './testing/queries';

async function find(typed: string) {
  TestBed.configureTestingModule({ providers: [provideRouter([])] });
  const navigate = jest.spyOn(TestBed.inject(Router), 'navigate').mockResolvedValue(true);
  const fixture = TestBed.createComponent(ReferenceSearch);
  await fixture.whenStable();
  const control = controlOf<HTMLInputElement>(fixture.nativeElement, 'Reference of an estimate');
  control.value = typed;
  control.dispatchEvent(new Event('input'));
  named(fixture.nativeElement, 'button', 'Find').click();
  await fixture.whenStable();
  return { navigate, text: (fixture.nativeElement as HTMLElement).textContent };
}

describe('ReferenceSearch', () => {
  it('leads to the estimate, whatever spaces and capitals came with the reference', async () => {
    const { navigate } = await find(' 4K2M 9x7q ');
    expect(navigate).toHaveBeenCalledWith(['/estimates', '4k2m9x7q']);
  });

  it.each(['', '4k2m', '../people', 'x'.repeat(33)])(
    'leads nowhere for %p, and says what a reference looks like',
    async (typed) => {
      const { navigate, text } = await find(typed);
      expect(navigate).not.toHaveBeenCalled();
      expect(text).toMatch(/Enter the reference|8 to 32 letters and digits/);
    },
  );
});
