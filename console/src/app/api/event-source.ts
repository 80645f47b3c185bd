import { InjectionToken } from '@angular/core';

/** How a stream of server-sent events is opened; specs put their own in its place. */
export const OPEN_EVENT_SOURCE = new InjectionToken<(url: string) => EventSource>('open an event source', {
  factory: () => (url) => new EventSource(url),
});
