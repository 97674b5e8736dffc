import { once } from 'node:events';
import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { createServer, request as httpRequest, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import express from 'express';
import { pino } from 'pino';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { cleanName } from '../../server/files/clean-name.ts';
import { type FileStore, folderStore } from '../../server/files/file-store.ts';
import { kindOfBytes, textOfBytes } from '../../server/files/kind-of-bytes.ts';
import { receiveUpload } from '../../server/files/receive-upload.ts';
import { sendFile } from '../../server/files/send-file.ts';
import { problemHandler } from '../../server/http/problem-handler.ts';

const bytesOf = (text: string) => Buffer.from(text, 'utf8');
const limitBytes = 100_000;

describe('files that people send', () => {
  let folder: string;
  let files: FileStore;
  let server: Server;
  let address: string;

  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'fairlead-files-'));
    files = folderStore(join(folder, 'files'));
    const app = express();
    app.post('/', async (incoming, response) => {
      const upload = await receiveUpload(incoming, response, limitBytes);
      if (upload === null) response.json({ name: null, body: incoming.body });
      else response.json({ name: upload.name, size: upload.bytes.length, body: incoming.body });
    });
    app.get('/:name', (incoming, response) =>
      sendFile(response, { name: incoming.params.name, bytes: bytesOf('<script>alert(1)</script>') }),
    );
    app.use(problemHandler(pino({ level: 'silent' })));
    server = createServer(app).listen(0, '127.0.0.1');
    await once(server, 'listening');
    address = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  });
  afterAll(async () => {
    server.closeAllConnections();
    server.close();
    await rm(folder, { recursive: true });
  });

  it('are kept once, by what is in them, and never anywhere else [Q13]', async () => {
    const digest = await files.put(bytesOf('1;2\n'));
    expect(digest).toBe('0eb6e0354782afba2e9c5708c3dacd1b4b2a36125547a363f6eaf85de2ed449b');
    expect(await files.put(bytesOf('1;2\n'))).toBe(digest);
    expect(await files.get(digest)).toEqual(bytesOf('1;2\n'));
    const kept = await readdir(join(folder, 'files'), { recursive: true });
    expect(kept.sort()).toEqual([digest.slice(0, 2), join(digest.slice(0, 2), digest)]);
    for (const wrong of ['0'.repeat(64), '../../etc/passwd', digest.toUpperCase(), ''])
      expect(await files.get(wrong)).toBeNull();
  });

  it('that have been changed where they lie are not given out [Q13]', async () => {
    const digest = await files.put(bytesOf('a true value'));
    await writeFile(join(folder, 'files', digest.slice(0, 2), digest), 'a bent value');
    await expect(files.get(digest)).rejects.toThrow('has been changed');
  });

  it('are what their bytes say, whatever they are called [Q14]', () => {
    expect(kindOfBytes(bytesOf('frequency;ohm\n20;0,1\n'))).toBe('text');
    expect(kindOfBytes(Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]))).toBe('png');
    expect(kindOfBytes(Buffer.from([0xff, 0xd8, 0xff, 0xe0]))).toBe('jpeg');
    expect(kindOfBytes(bytesOf('RIFF1234WEBPVP8 '))).toBe('webp');
    expect(kindOfBytes(bytesOf('%PDF-1.7'))).toBe('pdf');
    const programs = [
      '#!/bin/sh\nrm x',
      '<html><script>',
      '<?php system(1)',
      '<svg onload=x>',
      '\u007fELF\u0002\u0001',
    ];
    for (const program of programs) expect(kindOfBytes(bytesOf(program)), program).toBe('unknown');
  });

  it('are read as text with any of the marks and codes that spreadsheets write [Q14]', () => {
    expect(textOfBytes(Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from('2,5 Ω', 'utf16le')]))).toBe('2,5 Ω');
    expect(textOfBytes(Buffer.concat([Buffer.from([0xef, 0xbb, 0xbf]), bytesOf('2,5 Ω')]))).toBe('2,5 Ω');
    expect(textOfBytes(Buffer.from([0x32, 0x30, 0xb0, 0x43]))).toBe('20°C');
    expect(textOfBytes(Buffer.from([0x4d, 0x5a, 0x00, 0x03]))).toBeNull();
  });

  it('lose folders, markup and unseen characters from their names [Q14]', () => {
    expect(cleanName('../../etc/passwd')).toBe('passwd');
    expect(cleanName('C:\\Users\\me\\run 1.csv')).toBe('run 1.csv');
    expect(cleanName('<img src=x onerror="alert(1)">.csv')).toBe('_img src_x onerror__alert(1)__.csv');
    expect(cleanName('exe\u202egnp.csv\u0000')).toBe('exegnp.csv');
    for (const nothing of ['', '..', '/', '\u0007']) expect(cleanName(nothing)).toBe('file');
    expect(cleanName(`${'x'.repeat(300)}.csv`)).toMatch(/^x{116}\.csv$/);
  });

  it('arrive with the rest of the input, and under a clean name [Q14]', async () => {
    const { body } = await request(address)
      .post('/')
      .field('body', '{"note":"first"}')
      .attach('file', bytesOf('1;2'), '..\\Wärme.csv')
      .expect(200);
    expect(body).toEqual({ name: 'Wärme.csv', size: 3, body: { note: 'first' } });
    const broken = await request(address)
      .post('/')
      .field('body', '{')
      .attach('file', bytesOf('1'), 'a.csv')
      .expect(400);
    expect(broken.body.type).toBe('urn:fairlead:problem:invalid-input');
    const unseen = await request(address).post('/').attach('file', bytesOf('1'), 'a\u0001.csv').expect(400);
    expect(unseen.body.errors[0].pointer).toBe('/file');
    const two = await request(address).post('/').attach('file', bytesOf('1'), 'a').attach('file', bytesOf('2'), 'b');
    expect([two.status, two.body.errors]).toEqual([400, [{ pointer: '/file', detail: expect.any(String) }]]);
  });

  /** Sends so many bytes in pieces, or only says that it would. */
  function sends(bytes: number, isStated: boolean): Promise<{ status: number; body: string }> {
    const headers = {
      'content-type': 'multipart/form-data; boundary=edge',
      ...(isStated ? { 'content-length': bytes } : { 'transfer-encoding': 'chunked' }),
    };
    return new Promise((resolve, reject) => {
      const sent = httpRequest(address, { method: 'POST', headers }, (reply) => {
        let body = '';
        reply.on('data', (piece) => {
          body += piece;
        });
        reply.on('end', () => {
          sent.destroy();
          resolve({ status: reply.statusCode ?? 0, body });
        });
      });
      sent.on('error', reject);
      sent.write('--edge\r\ncontent-disposition: form-data; name="file"; filename="a.csv"\r\n\r\n');
      if (isStated) return;
      for (let left = bytes; left > 0; left -= 50_000) sent.write('1;2\n'.repeat(12_500));
      sent.end('\r\n--edge--\r\n');
    });
  }

  it('of 200 MB are refused before they are read, and others as soon as they are too large [Q14]', async () => {
    for (const reply of [await sends(200_000_000, true), await sends(400_000, false)]) {
      expect(reply.status).toBe(413);
      expect(JSON.parse(reply.body).detail).toBe('A file may have at most 100 kB. Nothing was kept.');
    }
  });

  it('go out to be saved and are never run [Q15]', async () => {
    const reply = await request(address)
      .get(`/${encodeURIComponent('Wärme "1".csv')}`)
      .expect(200);
    expect(reply.headers).toMatchObject({
      'content-type': 'application/octet-stream',
      'content-disposition': `attachment; filename="W_rme _1_.csv"; filename*=UTF-8''W%C3%A4rme%20%221%22.csv`,
      'x-content-type-options': 'nosniff',
      'content-security-policy': "default-src 'none'; sandbox",
    });
  });
});
