import type { Browser, Page } from 'playwright-core';
import postgres from 'postgres';
import { expect, inject } from 'vitest';
import { launchBrowser, openPage } from '#tests/support/browser.ts';
import type { OpenPageOptions, PageWatch } from '#tests/support/browser.ts';
import { cloneDatabase } from '#tests/support/database.ts';
import { startFakeMail } from '#tests/support/fake-mail.ts';
import type { FakeMail } from '#tests/support/fake-mail.ts';
import { objectStoreEnv } from '#tests/support/object-store.ts';
import { appProcess, freePort } from './app-process.ts';
import type { AppProcess } from './app-process.ts';

/** The whole application with a copy of the demonstration, a mail server and a browser, for one test file. */
export interface Stage {
  readonly baseUrl: string;
  /** The database behind the application, to look at what was stored. */
  readonly sql: postgres.Sql;
  readonly web: AppProcess;
  readonly worker: AppProcess;
  readonly mail: FakeMail;
  readonly browser: Browser;
  /** A new visitor, with cookies of their own. Addresses may be relative. */
  readonly visit: (options?: OpenPageOptions) => Promise<Page>;
  /** Ends everything, and fails if a page reported an error or asked for something from outside. */
  readonly close: () => Promise<void>;
}

export async function openStage(overrides: Readonly<Record<string, string>> = {}): Promise<Stage> {
  const database = await cloneDatabase(inject('seededTemplate'), 'e2e');
  const mail = await startFakeMail();
  const port = await freePort();
  const baseUrl = `http://127.0.0.1:${port}`;
  const env = {
    ...objectStoreEnv(),
    NODE_ENV: 'production',
    HOST: '127.0.0.1',
    PORT: String(port),
    PUBLIC_URL: baseUrl,
    DATABASE_URL: database.url,
    SMTP_URL: mail.url,
    LOG_LEVEL: 'warn',
    ...overrides,
  };
  const web = appProcess('server/index.js', env, `${baseUrl}/healthz`);
  const worker = appProcess('worker.mjs', env);
  const [browser] = await Promise.all([launchBrowser(), web.start(), worker.start()]);
  const watches: PageWatch[] = [];
  const sql = postgres(database.url, { max: 1 });
  return {
    baseUrl,
    sql,
    web,
    worker,
    mail,
    browser,
    visit: async (options = {}) => {
      const { page, watch } = await openPage(browser, { baseURL: baseUrl, ...options });
      watches.push(watch);
      return page;
    },
    close: async () => {
      await browser.close();
      await Promise.all([web.stop(), worker.stop()]);
      await mail.stop();
      await sql.end();
      await database.drop();
      expect(watches.flatMap((watch) => watch.faults), 'no page reported a fault').toEqual([]);
    },
  };
}
