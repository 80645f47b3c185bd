import { setupZonelessTestEnv } from 'jest-preset-angular/setup-env/zoneless';

// A template error or a leaked component fails the spec instead of printing a warning.
setupZonelessTestEnv({
  errorOnUnknownElements: true,
  errorOnUnknownProperties: true,
  teardown: { destroyAfterEach: true, rethrowErrors: true },
});
