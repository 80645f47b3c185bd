import { ApplicationRef, Component, effect, Injector, input, ViewEncapsulation } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { NgElementStrategy } from '@angular/elements';
import { RetainedStrategyFactory } from './retained-strategy';

const seen: string[] = [];

@Component({
  selector: 'tb-probe',
  template: '<label>Name <input /></label><p>{{ word() }}</p>',
  encapsulation: ViewEncapsulation.ExperimentalIsolatedShadowDom,
})
class Probe {
  readonly word = input('unset', { transform: (value: unknown) => String(value ?? 'removed') });

  constructor() {
    effect(() => void seen.push(this.word()));
  }
}

interface Made {
  readonly element: HTMLElement;
  readonly strategy: NgElementStrategy;
  readonly text: () => string;
}

function make(): Made {
  const strategy = new RetainedStrategyFactory(Probe).create(TestBed.inject(Injector));
  const element = document.createElement('div');
  document.body.append(element);
  return { element, strategy, text: () => element.shadowRoot?.querySelector('p')?.textContent ?? '' };
}

async function stable(): Promise<void> {
  await TestBed.inject(ApplicationRef).whenStable();
}

describe('RetainedStrategy', () => {
  beforeEach(() => {
    seen.length = 0;
  });
  afterEach(() => document.body.replaceChildren());

  it('gives the component what was set before the element entered the document', async () => {
    const { element, strategy, text } = make();
    strategy.setInputValue('word', 'early');
    expect(strategy.getInputValue('word')).toBe('early');
    strategy.connect(element);
    await stable();
    expect(text()).toBe('early');
    expect(seen).toEqual(['early']);
  });

  it('follows an attribute that changes or is removed', async () => {
    const { element, strategy, text } = make();
    strategy.connect(element);
    strategy.setInputValue('word', 'later');
    await stable();
    expect(text()).toBe('later');
    strategy.setInputValue('word', null as unknown as string);
    await stable();
    expect(text()).toBe('removed');
  });

  it('keeps what was typed and every input when the element leaves and comes back, however late', async () => {
    const { element, strategy, text } = make();
    strategy.setInputValue('word', 'kept');
    strategy.connect(element);
    await stable();
    const field = element.shadowRoot?.querySelector('input');
    field?.setRangeText('Sandpiper');
    element.remove();
    strategy.disconnect();
    await new Promise((resolve) => setTimeout(resolve, 30));
    document.body.append(element);
    strategy.connect(element);
    await stable();
    expect(element.shadowRoot?.querySelector('input')).toBe(field);
    expect(field?.value).toBe('Sandpiper');
    expect(text()).toBe('kept');
    expect(seen).toEqual(['kept']);
  });

  it('leaves nothing behind in the application while the element is out of the document', async () => {
    const { element, strategy } = make();
    const application = TestBed.inject(ApplicationRef);
    strategy.connect(element);
    expect(application.viewCount).toBe(1);
    strategy.disconnect();
    expect(application.viewCount).toBe(0);
    strategy.connect(element);
    strategy.connect(element);
    expect(application.viewCount).toBe(1);
    strategy.disconnect();
  });

  it('takes up a change made while the element was away', async () => {
    const { element, strategy, text } = make();
    strategy.connect(element);
    await stable();
    strategy.disconnect();
    strategy.setInputValue('word', 'changed');
    strategy.connect(element);
    await stable();
    expect(text()).toBe('changed');
  });
});
