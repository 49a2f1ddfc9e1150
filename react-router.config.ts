import type { Config } from '@react-router/dev/config';

export default {
  ssr: true,
  // A report begun at the place of the fire must go on when the connection is gone: all routes are known from the start.
  routeDiscovery: { mode: 'initial' },
  future: {
    v8_middleware: true,
    v8_viteEnvironmentApi: true,
  },
} satisfies Config;
