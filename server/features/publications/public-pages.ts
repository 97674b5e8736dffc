import { Router } from 'express';
import { publicationsApi } from '#shared/contracts/publications.ts';
import { registryApi, registryPath } from '#shared/contracts/registry.ts';
import { Problem } from '#shared/problem.ts';
import type { Deps } from '../../deps.ts';
import { limit } from '../../http/rate-limit.ts';
import { listRegistry, publicRegistries } from '../registry/registry.service.ts';
import { getBundle } from './bundle.service.ts';
import { html, jsonScript } from './page/html.ts';
import { publicationContent } from './page/publication-page.ts';
import { publicationsContent } from './page/publications-page.ts';
import { registryContent } from './page/registry-page.ts';
import { shellPage } from './page/shell.ts';
import { structuredData } from './page/structured-data.ts';
import { getDocument, getPublication, listPublications, publicAddresses } from './publications.service.ts';
import { bundlePath, filePath, publicPath } from './publications.views.ts';

const idOf = (id: unknown) => publicationsApi.get.params?.safeParse({ id }).data?.id ?? null;

async function found<T>(look: Promise<T>): Promise<T | null> {
  try {
    return await look;
  } catch (error) {
    if (error instanceof Problem && error.code === 'not-found') return null;
    throw error;
  }
}

const xml = (text: string) => text.replaceAll('&', '&amp;').replaceAll('<', '&lt;');

/** Pages for anybody, served ready to read: publications, their documents, and what leads search engines to them. */
export function publicPages(deps: Deps): Router {
  const { publicUrl, clientDir } = deps.config;
  const router = Router();

  router.get('/robots.txt', (_request, response) => {
    const open = ['/p', '/registry', '/api/publications', '/api/registry', '/assets'].map((path) => `Allow: ${path}`);
    const closed = ['/api', '/organisations', '/listen', '/seat'].map((path) => `Disallow: ${path}`);
    response
      .type('text/plain')
      .send(`${['User-agent: *', ...open, ...closed, '', `Sitemap: ${publicUrl}/sitemap.xml`].join('\n')}\n`);
  });

  router.get('/sitemap.xml', async (_request, response) => {
    const addresses = await publicAddresses(deps);
    const urls = addresses.map(
      ({ id, changedAt }) =>
        `<url><loc>${xml(publicUrl + publicPath(id))}</loc><lastmod>${changedAt.toISOString()}</lastmod></url>`,
    );
    const registries = (await publicRegistries(deps)).map(
      (id) => `<url><loc>${xml(publicUrl + registryPath(id))}</loc></url>`,
    );
    response
      .type('application/xml')
      .send(
        `<?xml version="1.0" encoding="UTF-8"?>\n<urlset xmlns="http://www.sitemaps.org/schemas/sitemap/0.9"><url><loc>${xml(publicUrl)}/p</loc></url>${urls.join('')}${registries.join('')}</urlset>\n`,
      );
  });

  router.get('/p', async (request, response) => {
    const query = publicationsApi.list.query?.safeParse(request.query).data ?? { q: '', page: 1 };
    const head = {
      title: 'Published results · Fairlead',
      description: 'Blind listening tests of audio cables, each with its record to check.',
      canonical: `${publicUrl}/p`,
      data: null,
    };
    const page = shellPage(clientDir, head, publicationsContent(await listPublications(deps, query)));
    response.set('cache-control', 'no-cache').type('html').send(page);
  });

  router.get(publicPath(':id'), async (request, response, next) => {
    const id = idOf(request.params.id);
    const publication = id === null ? null : await found(getPublication(deps, id));
    if (publication === null) {
      // The application says that there is nothing here; the status says it to machines.
      response.status(404);
      return next();
    }
    const { headline, description, address, withdrawn } = publication;
    // Where a search engine shows no more than these two, they say it too.
    const said = withdrawn === null ? '' : 'Withdrawn: ';
    const data = jsonScript('application/ld+json', structuredData(publication));
    const head = {
      title: `${said}${headline} · Fairlead`,
      description: said + description,
      canonical: address,
      data: html`${data}`,
    };
    response
      .set('cache-control', 'no-cache')
      .type('html')
      .send(shellPage(clientDir, head, publicationContent(publication)));
  });

  router.get(registryPath(':organisationId'), async (request, response, next) => {
    const { list } = registryApi;
    const organisationId = list.params?.safeParse(request.params).data?.organisationId ?? null;
    const query = list.query?.safeParse(request.query).data ?? { q: '', page: 1, state: 'any' as const };
    const registry = organisationId === null ? null : await found(listRegistry(deps, organisationId, query));
    if (organisationId === null || registry === null) {
      response.status(404);
      return next();
    }
    const head = {
      title: `Sealed protocols of ${registry.organisation} · Fairlead`,
      description: `Every listening test that ${registry.organisation} has sealed, whatever became of it: a log that can only grow.`,
      canonical: publicUrl + registryPath(organisationId),
      data: null,
    };
    response
      .set('cache-control', 'no-cache')
      .type('html')
      .send(shellPage(clientDir, head, registryContent(organisationId, registry)));
  });

  router.get(bundlePath(':id'), limit({ attempts: 120, windowMs: 600_000 }), async (request, response) => {
    const id = idOf(request.params.id);
    if (id === null) throw new Problem('not-found', 'Nothing is published at this address.');
    response
      .set('cache-control', 'no-cache')
      .set('content-disposition', `attachment; filename="fairlead-${id}.zip"`)
      .type('application/zip')
      .send(Buffer.from(await getBundle(deps, id)));
  });

  router.get(filePath(':id', ':digest'), async (request, response) => {
    const id = idOf(request.params.id);
    if (id === null) throw new Problem('not-found', 'Nothing is published at this address.');
    response
      .set('cache-control', 'public, max-age=31536000, immutable')
      .set('content-disposition', `attachment; filename="fairlead-${id}.json"`)
      .type('application/json')
      .send(await getDocument(deps, id, String(request.params.digest)));
  });
  return router;
}
