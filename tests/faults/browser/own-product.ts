import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Cluster } from '../../../scripts/setup/cluster.mjs';
import { prepareDatabase } from '../../../scripts/setup/database.mjs';
import { root } from '../../../scripts/setup/folders.mjs';
import { ensurePostgres } from '../../../scripts/setup/installed.mjs';
import { freePort } from '../../../scripts/setup/ports.mjs';
import { answers } from '../../../scripts/setup/run.mjs';
import { environmentFor } from '../../../scripts/setup/secrets.mjs';
import { testSecrets } from '../../../scripts/setup/test-cluster.mjs';

const DATABASE = 'cagewright_killed';

/** The built application with a PostgreSQL of its own, on free ports and in a folder of its own: to be killed. */
export class OwnProduct {
  #application: ChildProcess | null = null;

  private constructor(
    private readonly folder: string,
    readonly cluster: Cluster,
    private readonly port: number,
  ) {}

  static async start(): Promise<OwnProduct> {
    const folder = mkdtempSync(path.join(tmpdir(), 'cagewright-killed-'));
    // As durable as the real one: what was committed has to survive a kill.
    const cluster = new Cluster({
      binaries: ensurePostgres(),
      folder: path.join(folder, 'postgres'),
      port: await freePort(),
      password: 'postgres-for-tests-only',
    });
    cluster.start();
    await prepareDatabase(cluster, DATABASE, testSecrets);
    const product = new OwnProduct(folder, cluster, await freePort());
    await product.startApplication();
    return product;
  }

  get app(): string {
    return `http://localhost:${this.port}`;
  }

  get database(): string {
    return this.cluster.url(DATABASE);
  }

  async startApplication(): Promise<void> {
    // Nothing of this run needs photos or mail: those ports answer nobody.
    const ports = { app: this.port, objects: 9, smtp: 9, mail: 9 };
    const env = environmentFor({ secrets: testSecrets, cluster: this.cluster, database: DATABASE, ports });
    this.#application = spawn(
      process.execPath,
      ['node_modules/next/dist/bin/next', 'start', '-H', '127.0.0.1', '-p', String(this.port)],
      {
        cwd: root,
        detached: true,
        stdio: 'ignore',
        env: { ...env, NODE_ENV: 'production', LOG_LEVEL: 'silent' },
      },
    );
    await answers(`${this.app}/api/health`);
  }

  /** As a machine that loses its power: nothing is finished, nothing is said. */
  async killApplication(): Promise<void> {
    const child = this.#application;
    this.#application = null;
    if (!child?.pid || child.exitCode !== null || child.signalCode !== null) return;
    const gone = new Promise((done) => child.once('exit', done));
    process.kill(-child.pid, 'SIGKILL');
    await gone;
  }

  /** PostgreSQL ends at once, without a checkpoint, and is started again: it recovers from its log. */
  async killDatabase(downMs: number): Promise<void> {
    this.cluster.stop('immediate');
    await new Promise((done) => setTimeout(done, downMs));
    this.cluster.start();
  }

  async remove(): Promise<void> {
    await this.killApplication();
    this.cluster.stop('immediate');
    rmSync(this.folder, { recursive: true, force: true });
  }
}
