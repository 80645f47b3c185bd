import { once } from 'node:events';
import { createServer, get, type IncomingMessage } from 'node:http';
import type { AddressInfo } from 'node:net';
import { PassThrough, Readable } from 'node:stream';
import express from 'express';
import { sendDownload } from './send-download';

/** Sends the bytes to a client that leaves at the first of them, when it is to; what came of the sending. */
async function sending(bytes: Readable, leave: boolean): Promise<unknown> {
  const app = express();
  const sent = new Promise<unknown>((resolve) => {
    app.get('/', async (_request, response) => {
      const download = { fileName: 'boats.csv', type: 'text/csv', bytes };
      resolve(await sendDownload(response, download).catch((error: unknown) => error));
      response.destroy();
    });
  });
  const server = createServer(app).listen(0);
  await once(server, 'listening');
  const asked = get(`http://127.0.0.1:${(server.address() as AddressInfo).port}/`).on('error', () => undefined);
  const [answer] = (await once(asked, 'response')) as [IncomingMessage];
  answer.on('error', () => undefined).resume();
  if (leave) asked.destroy();
  const outcome = await sent;
  server.close();
  return outcome;
}

describe('a download', () => {
  it('is no error when whoever asked goes away before its end, and its source is destroyed', async () => {
    const endless = new PassThrough();
    endless.write('length');
    expect(await sending(endless, true)).toBeUndefined();
    expect(endless.destroyed).toBe(true);
  });

  it('is an error when its source breaks', async () => {
    async function* breaking() {
      yield Buffer.from('length');
      await new Promise((resolve) => setImmediate(resolve));
      throw new Error('the disk is broken');
    }
    expect(await sending(Readable.from(breaking()), false)).toMatchObject({ message: 'the disk is broken' });
  });
});
