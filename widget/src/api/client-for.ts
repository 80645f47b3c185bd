import { InjectionToken } from '@angular/core';
import { Connection, EstimatesClient } from './estimates-client';

export type ClientFor = (connection: Connection) => Pick<EstimatesClient, 'describe' | 'ask'>;

/** Makes the client for the desk that an element names. */
export const CLIENT_FOR = new InjectionToken<ClientFor>('CLIENT_FOR', {
  providedIn: 'root',
  factory: () => (connection) => new EstimatesClient(connection),
});
