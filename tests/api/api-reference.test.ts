import { Validator } from '@seriousme/openapi-schema-validator';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('the API reference', () => {
  let server: TestServer;
  beforeAll(async () => {
    server = await testServer();
  });
  afterAll(() => server.stop());

  it('is an OpenAPI document that holds every mounted endpoint and no other [A6]', async () => {
    const { body } = await request(server.address).get('/api/openapi.json').expect(200);
    const validated = await new Validator().validate(structuredClone(body));
    expect(validated.errors).toBeUndefined();
    expect(validated.valid).toBe(true);
    const listed = Object.entries<object>(body.paths).flatMap(([path, operations]) =>
      Object.keys(operations).map((method) => `${method.toUpperCase()} ${path}`),
    );
    const mounted = server.server.mounted.map(
      ({ contract }) => `${contract.method} /api${contract.path.replace(/:(\w+)/g, '{$1}')}`,
    );
    expect(listed.toSorted()).toEqual(mounted.toSorted());
  });

  it('says who may call an endpoint and what a body may hold [A6]', async () => {
    const { body } = await request(server.address).get('/api/openapi.json');
    const create = body.paths['/api/organisations/{organisationId}/studies'].post;
    expect(create.description).toContain('owner, manager');
    expect(create.requestBody.content['application/json'].schema).toMatchObject({
      type: 'object',
      additionalProperties: false,
      properties: { trials: { type: 'integer' } },
    });
  });

  it('has a page for people, from this server alone', async () => {
    const page = await request(server.address).get('/api/docs').expect(200);
    expect(page.text).not.toMatch(/https?:/);
    for (const [, address = ''] of page.text.matchAll(/(?:src|href)="([^"]+)"/g))
      await request(server.address).get(address).expect(200);
  });
});
