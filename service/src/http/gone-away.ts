import type { Response } from 'express';
import { DeskError } from '../errors';

/** Aborted when the client goes away before it is answered. */
export function goneAway(response: Response): AbortSignal {
  const controller = new AbortController();
  response.once('close', () => {
    if (!response.writableFinished)
      controller.abort(new DeskError('body-unreadable', 'The call was broken off before it was answered.'));
  });
  return controller.signal;
}
