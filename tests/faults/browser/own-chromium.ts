import { chromium, type Browser, type BrowserContext, type Page } from '@playwright/test';
import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { createInterface } from 'node:readline';
import { sessionCookie, type BuildingSite, type SitePerson } from './building-site';

/** A folder for a browser's profile that is gone at the end. */
export function profileFolder(): { folder: string; remove: () => void } {
  const folder = mkdtempSync(path.join(tmpdir(), 'cagewright-chromium-'));
  return { folder, remove: () => rmSync(folder, { recursive: true, force: true }) };
}

/** Chromium as a process of our own: with a profile that stays, and to be killed without a farewell. */
export class OwnChromium {
  private constructor(
    private readonly child: ChildProcess,
    readonly browser: Browser,
    readonly context: BrowserContext,
  ) {}

  /**
   * @param folder the profile's
   * @param proxy the port of a proxy on this machine through which everything goes, the app's own address included
   */
  static async start(folder: string, { proxy }: { proxy?: number } = {}): Promise<OwnChromium> {
    const child = spawn(
      '/usr/bin/chromium',
      [
        '--headless=new',
        '--remote-debugging-port=0',
        `--user-data-dir=${folder}`,
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--disable-quic',
        '--disable-gpu',
        '--window-size=390,844',
        ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []),
        ...(proxy ? [`--proxy-server=http://127.0.0.1:${proxy}`, '--proxy-bypass-list=<-loopback>'] : []),
        'about:blank',
      ],
      { detached: true, stdio: ['ignore', 'ignore', 'pipe'] },
    );
    const address = await new Promise<string>((found, failed) => {
      if (!child.stderr) return failed(new Error('Chromium says nothing.'));
      const said: string[] = [];
      createInterface({ input: child.stderr }).on('line', (line) => {
        said.push(line);
        const listening = /^DevTools listening on (ws:\S+)/.exec(line)?.[1];
        if (listening) found(listening);
      });
      child.once('exit', () => failed(new Error(`Chromium did not start: ${said.slice(-5).join(' ')}`)));
    });
    const browser = await chromium.connectOverCDP(address);
    const [context] = browser.contexts();
    if (!context) throw new Error('Chromium has no context.');
    return new OwnChromium(child, browser, context);
  }

  async page(): Promise<Page> {
    const page = await this.context.newPage();
    await page.setViewportSize({ width: 390, height: 844 });
    return page;
  }

  async signIn(site: BuildingSite, person: SitePerson): Promise<void> {
    await this.context.addCookies([sessionCookie(site, person)]);
  }

  /** As a phone that is switched off, or a system that ends the browser for want of memory. */
  async kill(): Promise<void> {
    await this.#gone(() => this.child.pid && process.kill(-this.child.pid, 'SIGKILL'));
    await this.browser.close().catch(() => undefined);
  }

  /** As somebody who closes the browser. */
  async quit(): Promise<void> {
    const session = await this.browser.newBrowserCDPSession();
    await this.#gone(() => void session.send('Browser.close').catch(() => undefined));
    await this.browser.close().catch(() => undefined);
  }

  async #gone(end: () => unknown): Promise<void> {
    if (this.child.exitCode !== null || this.child.signalCode !== null) return;
    const gone = new Promise((done) => this.child.once('exit', done));
    end();
    await gone;
  }
}
