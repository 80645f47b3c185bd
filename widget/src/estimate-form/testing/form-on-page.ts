import { ComponentFixture, TestBed } from '@angular/core/testing';
import { CLIENT_FOR } from '../../api/client-for';
import type { Inputs, PublishedEstimator } from '../../api/contract';
import { Connection } from '../../api/estimates-client';
import { estimateExample, estimatorExample } from '../../api/examples.fixture';
import { EstimateForm } from '../estimate-form';

type Reply<T> = () => Promise<T>;

/** Stands for the desk on the other side of the network. */
class Desk {
  describe: Reply<PublishedEstimator> = () => Promise.resolve(estimatorExample());
  ask: Reply<ReturnType<typeof estimateExample>> = () => Promise.resolve(estimateExample());
  readonly described: { connection: Connection; slug: string }[] = [];
  readonly asked: { connection: Connection; slug: string; inputs: Inputs }[] = [];
}

/** The form on somebody's page, for specs; a new one for each test. */
export class FormOnPage {
  readonly desk = new Desk();
  /** What the page hears. */
  readonly events: CustomEvent[] = [];
  private opened?: ComponentFixture<EstimateForm>;

  get fixture(): ComponentFixture<EstimateForm> {
    if (!this.opened) throw new Error('the form is not open');
    return this.opened;
  }

  async open(attributes: Record<string, unknown> = {}): Promise<void> {
    TestBed.configureTestingModule({ providers: [{ provide: CLIENT_FOR, useValue: this.clientFor }] });
    this.opened = TestBed.createComponent(EstimateForm);
    const host = this.opened.nativeElement as HTMLElement;
    document.body.append(host);
    for (const name of ['tarebeam-estimate', 'tarebeam-error'])
      host.addEventListener(name, (event) => this.events.push(event as CustomEvent));
    const given = { estimator: 'refit-labour', key: 'tb_key', service: 'https://desk.example', locale: 'en-GB' };
    for (const [name, value] of Object.entries({ ...given, ...attributes }))
      this.opened.componentRef.setInput(name, value);
    await this.settle();
  }

  leave(): void {
    document.body.replaceChildren();
  }

  root(): ShadowRoot {
    const { shadowRoot } = this.fixture.nativeElement as HTMLElement;
    if (!shadowRoot) throw new Error('the form has no shadow root');
    return shadowRoot;
  }

  text(selector: string): string {
    return (this.root().querySelector(selector)?.textContent ?? '').replace(/[\s\u00a0\u202f]+/g, ' ').trim();
  }

  labelled(label: string): HTMLInputElement | HTMLSelectElement {
    const labels = [...this.root().querySelectorAll('label')];
    const found = labels.find((each) => (each.textContent ?? '').trim().startsWith(label));
    const control = found?.htmlFor ? this.root().getElementById(found.htmlFor) : found?.querySelector('input');
    if (control instanceof HTMLInputElement || control instanceof HTMLSelectElement) return control;
    throw new Error(`no field ${label}`);
  }

  async enter(label: string, value: string): Promise<void> {
    const control = this.labelled(label);
    control.value = value;
    control.dispatchEvent(new Event('input', { bubbles: true }));
    control.dispatchEvent(new Event('change', { bubbles: true }));
    await this.fixture.whenStable();
  }

  async choose(label: string): Promise<void> {
    this.labelled(label).click();
    await this.fixture.whenStable();
  }

  /** Every field that is required. */
  async fillIn(): Promise<void> {
    await this.enter('Length overall', '12.6');
    await this.enter('Displacement', '9.8 t');
    await this.choose('steel');
    await this.enter('Scope of work', 'deck');
  }

  async press(name: string): Promise<void> {
    const button = [...this.root().querySelectorAll('button')].find((each) => each.textContent?.trim() === name);
    if (!button) throw new Error(`no button ${name}`);
    button.click();
    await this.settle();
  }

  async settle(): Promise<void> {
    await new Promise((resolve) => setTimeout(resolve));
    await this.fixture.whenStable();
  }

  private readonly clientFor = (connection: Connection): object => ({
    describe: (slug: string) => (this.desk.described.push({ connection, slug }), this.desk.describe()),
    ask: (slug: string, inputs: Inputs) => (this.desk.asked.push({ connection, slug, inputs }), this.desk.ask()),
  });
}
