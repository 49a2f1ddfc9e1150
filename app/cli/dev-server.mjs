/** The web server for development: the same Express application, compiled and reloaded on change by Vite. */
import express from 'express';
import { createServer } from 'vite';

const port = Number(process.env.PORT || 3000);
const host = process.env.HOST || '127.0.0.1';

const vite = await createServer({ server: { middlewareMode: true, hmr: { host } } });
const web = express();
web.disable('x-powered-by');
web.use(vite.middlewares);
web.use(async (request, response, next) => {
  try {
    const { app } = await vite.ssrLoadModule('./app/server.ts');
    app(request, response, next);
  } catch (error) {
    if (error instanceof Error) vite.ssrFixStacktrace(error);
    next(error);
  }
});

const server = web.listen(port, host, (error) => {
  if (!error) return;
  console.error(error.message);
  process.exit(1);
});

for (const signal of ['SIGTERM', 'SIGINT']) {
  process.once(signal, () => {
    server.closeAllConnections();
    void vite.close().finally(() => process.exit(0));
  });
}
