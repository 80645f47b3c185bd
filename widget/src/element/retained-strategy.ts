import { ApplicationRef, ComponentRef, createComponent, Injector, Type } from '@angular/core';
import { NgElementStrategy, NgElementStrategyFactory } from '@angular/elements';
import { NEVER } from 'rxjs';
import { adoptBlockedStyles } from './blocked-styles';

/**
 * Keeps one component for the whole life of its element. The strategy that comes with Angular Elements destroys the
 * component 10 ms after the element has left the document; when the element comes back it would start without its inputs,
 * and it cannot even do that with a shadow root, because an element takes only one.
 * Out of the document the view is detached: it is not checked, and nothing but its element holds on to it.
 */
export class RetainedStrategyFactory implements NgElementStrategyFactory {
  constructor(private readonly component: Type<object>) {}

  create(injector: Injector): NgElementStrategy {
    return new RetainedStrategy(this.component, injector);
  }
}

class RetainedStrategy implements NgElementStrategy {
  /** The component dispatches its events itself, so that they bubble. */
  readonly events = NEVER;
  private readonly application: ApplicationRef;
  private readonly early = new Map<string, unknown>();
  private created: ComponentRef<object> | null = null;
  private attached = false;

  constructor(
    private readonly component: Type<object>,
    injector: Injector,
  ) {
    this.application = injector.get(ApplicationRef);
  }

  connect(element: HTMLElement): void {
    this.created ??= this.create(element);
    if (!this.attached) {
      this.attached = true;
      this.application.attachView(this.created.hostView);
    }
    adoptBlockedStyles(element.shadowRoot);
  }

  disconnect(): void {
    if (this.created && this.attached) {
      this.attached = false;
      this.application.detachView(this.created.hostView);
    }
  }

  getInputValue(name: string): unknown {
    return this.created ? Reflect.get(this.created.instance, name) : this.early.get(name);
  }

  setInputValue(name: string, value: unknown): void {
    if (this.created) {
      this.created.setInput(name, value);
    } else {
      this.early.set(name, value);
    }
  }

  private create(hostElement: HTMLElement): ComponentRef<object> {
    const created = createComponent(this.component, { environmentInjector: this.application.injector, hostElement });
    for (const [name, value] of this.early) {
      created.setInput(name, value);
    }
    this.early.clear();
    return created;
  }
}
