import { TestBed } from '@angular/core/testing';
import { MeasuredValue } from '../format/precision';
import { IntervalBar } from './interval-bar';

async function show(measured: MeasuredValue): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(IntervalBar);
  fixture.componentRef.setInput('measured', measured);
  fixture.componentRef.setInput('locale', 'en-GB');
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

describe('IntervalBar', () => {
  it('writes the ends as the interval deserves', async () => {
    const texts = [...(await show({ value: 512.3, low: 438.6, high: 592.2 })).querySelectorAll('text')];
    expect(texts.map(({ textContent }) => textContent?.trim())).toEqual(['440', '590', '320', '710']);
  });

  it('draws an end that is not bounded with a broken outline', async () => {
    const bar = await show({ value: 512.3, low: 438.6, high: null });
    expect(bar.querySelector('rect')?.getAttribute('stroke-dasharray')).toBeTruthy();
  });

  it('draws nothing where the records set no bound', async () => {
    expect((await show({ value: 512.3, low: null, high: null })).querySelector('svg')).toBeNull();
  });
});
