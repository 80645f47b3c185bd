import { setupZonelessTestEnv } from 'jest-preset-angular/setup-env/zoneless';

// A template error or a leaked component fails the spec instead of printing a warning.
setupZonelessTestEnv({
  errorOnUnknownElements: true,
  errorOnUnknownProperties: true,
  teardown: { destroyAfterEach: true, rethrowErrors: true },
});

/** jsdom lays nothing out, so nothing ever comes into view. A spec that needs to see more puts its own in place. */
class NothingInView implements IntersectionObserver {
  readonly root = null;
  readonly rootMargin = '';
  readonly thresholds: readonly number[] = [];
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
  takeRecords(): IntersectionObserverEntry[] {
    return [];
  }
}

globalThis.IntersectionObserver ??= NothingInView;

/** Nor does anything scroll. */
Element.prototype.scrollIntoView ??= () => {};
