import { CdkDropList } from '@angular/cdk/drag-drop';
import { TestBed } from '@angular/core/testing';
import { provideHttpClient } from '@angular/common/http';
import { By } from '@angular/platform-browser';
import { provideRouter } from '@angular/router';
import { FEET, RENAME, REPEATED } from '../testing/mending';
import { REVISION } from '../testing/refits';
import { StepList } from './step-list';
import type { Steps } from './steps-history';
import { Trials } from './trials';

describe('dragging a step', () => {
  async function dropped(previousIndex: number, currentIndex: number): Promise<readonly Steps[]> {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideRouter([]), Trials] });
    const fixture = TestBed.createComponent(StepList);
    fixture.componentRef.setInput('revision', REVISION);
    fixture.componentRef.setInput('steps', [FEET, RENAME, REPEATED]);
    const lists: Steps[] = [];
    fixture.componentInstance.changed.subscribe((steps) => lists.push(steps));
    await fixture.whenStable();
    fixture.debugElement
      .query(By.directive(CdkDropList))
      .triggerEventHandler('cdkDropListDropped', { previousIndex, currentIndex });
    return lists;
  }

  it('moves it to where it is dropped', async () => {
    expect(await dropped(0, 2)).toEqual([[RENAME, REPEATED, FEET]]);
  });

  it('changes nothing when it is dropped where it was', async () => {
    expect(await dropped(1, 1)).toEqual([]);
  });
});
