import { readFileSync } from 'node:fs';
import express, { type Router } from 'express';
import { absolutePath } from 'swagger-ui-dist';
import type { Mounted } from '../../http/mount.ts';
import { openApiOf } from './openapi.ts';

const page = readFileSync(new URL('./page.html', import.meta.url), 'utf8');
const start = readFileSync(new URL('./page-start.js', import.meta.url), 'utf8');

/** The API reference: the document for programs, and a page for people. Made from what is mounted; mount it last. */
export function apiReferenceRoutes(router: Router, mounted: readonly Mounted[], version: string): void {
  const contracts = mounted.map(({ contract }) => contract);
  const document = openApiOf(contracts, version);
  router.get('/openapi.json', (_request, response) => {
    response.json(document);
  });
  router.get('/docs', (_request, response) => {
    response.type('html').send(page);
  });
  router.get('/docs/start.js', (_request, response) => {
    response.type('js').send(start);
  });
  router.use('/docs', express.static(absolutePath(), { index: false }));
}
