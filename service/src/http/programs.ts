import { join } from 'node:path';
import express, { Router, type Response } from 'express';
import { rootFolder } from '../root-folder';
import { openToOtherOrigins } from './security-headers';

const consoleFolder = join(rootFolder, 'dist', 'console', 'browser');
const widgetFolder = join(rootFolder, 'dist', 'widget', 'browser');

/** Files whose names carry a hash never change. */
function cacheByName(response: Response, path: string): void {
  const hashed = /-[A-Z0-9]{8}\.\w+$/.test(path);
  response.setHeader('Cache-Control', hashed ? 'public, max-age=31536000, immutable' : 'no-cache');
}

/** The widget's one file, for any partner's page. The builder names its entry main.js whatever it is called. */
export function widgetProgram(): Router {
  const router = Router();
  router.use(openToOtherOrigins, (_request, response, next) => {
    response.setHeader('Access-Control-Allow-Origin', '*');
    next();
  });
  router.get('/tarebeam-form.js', (_request, response) => {
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(join(widgetFolder, 'main.js'));
  });
  return router;
}

/** The console; every address without a file is one of its screens. */
export function consoleProgram(): Router {
  const router = Router();
  router.use(express.static(consoleFolder, { setHeaders: cacheByName, index: false }));
  router.get(/^\/(?!api\/|v1\/|docs\/|widget\/)[^.]*$/, (_request, response) => {
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(join(consoleFolder, 'index.html'));
  });
  return router;
}
