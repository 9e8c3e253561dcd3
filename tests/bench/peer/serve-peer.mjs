import { createRequire } from 'node:module';
import { mkdirSync, readFileSync } from 'node:fs';
import path from 'node:path';

/**
 * The peer's own server: PouchDB on LevelDB behind express, databases under `/db`, and a page of its own origin from
 * which a browser replicates.
 * Usage: node serve-peer.mjs <port> <folder with its node_modules> <folder for its data>
 */
const [, , port, packages, data] = process.argv;
const require = createRequire(path.join(packages, 'package.json'));
const express = require('express');
const PouchDB = require('pouchdb');

mkdirSync(data, { recursive: true });
const stored = PouchDB.defaults({ prefix: `${data}/` });
const script = readFileSync(path.join(packages, 'node_modules/pouchdb/dist/pouchdb.min.js'));

const app = express();
app.get('/', (_request, response) =>
  response.type('html').send('<!doctype html><title>Peer</title><script src="/pouchdb.js"></script>'),
);
app.get('/pouchdb.js', (_request, response) => response.type('js').send(script));
app.use(
  '/db',
  require('express-pouchdb')(stored, {
    inMemoryConfig: true,
    mode: 'minimumForPouchDB',
    logPath: '/dev/null',
  }),
);
app.listen(Number(port), '127.0.0.1');
