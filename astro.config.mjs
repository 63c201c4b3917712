// @ts-check
import { fileURLToPath } from 'node:url';
import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig, passthroughImageService } from 'astro/config';
import auth from 'auth-astro';
import { build } from 'vite';
import { prepareEnvironment } from './src/server/environment.mjs';

/** @param {string} path */
const here = (path) => fileURLToPath(new URL(path, import.meta.url));
// tsconfig's `paths` do not reach worker bundles; Vite's own aliases do.
const alias = { '@workers': here('./workers'), '@': here('./src') };

/** Workers' Node entries become self-contained files beside the built server. */
const nodeWorkers = {
  name: 'node-workers',
  hooks: {
    'astro:server:setup': () => {
      prepareEnvironment();
    },
    'astro:build:done': async () => {
      await build({
        configFile: false,
        logLevel: 'error',
        publicDir: false,
        resolve: { alias },
        ssr: { noExternal: true },
        build: {
          ssr: true,
          target: 'node20',
          outDir: here('./dist/server/workers'),
          rollupOptions: {
            input: {
              build: here('./workers/build/node.ts'),
              examine: here('./workers/examine/node.ts'),
              files: here('./workers/files/node.ts'),
              simulate: here('./workers/simulate/node.ts'),
              upload: here('./workers/upload/node.ts'),
            },
            output: { entryFileNames: '[name].mjs' },
          },
        },
      });
    },
  },
};

export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'standalone' }),
  integrations: [react(), auth({ configFile: here('./src/server/auth/auth.config.ts') }), nodeWorkers],
  server: {
    host: '127.0.0.1',
    port: 4321,
    headers: {
      'Cross-Origin-Opener-Policy': 'same-origin',
      'Cross-Origin-Embedder-Policy': 'require-corp',
      'Cross-Origin-Resource-Policy': 'same-origin',
    },
  },
  // The origin is checked by our own middleware, which answers in the interface's error shape and lets scripts with a
  // token through; the host is pinned by src/server/main.mjs.
  security: { checkOrigin: false, allowedDomains: [{}] },
  image: { service: passthroughImageService() },
  experimental: {
    csp: {
      directives: [
        "default-src 'self'",
        "img-src 'self' data: blob:; style-src-attr 'unsafe-inline'",
        "worker-src 'self'",
        "object-src 'none'",
        "base-uri 'none'",
        "form-action 'self'",
        "frame-ancestors 'none'",
      ],
      scriptDirective: { resources: ["'self'", "'wasm-unsafe-eval'"] },
      styleDirective: { resources: ["'self'"] },
    },
  },
  devToolbar: { enabled: false },
  vite: {
    plugins: [tailwindcss()],
    resolve: { alias },
    worker: { format: 'es' },
    build: { assetsInlineLimit: 0, chunkSizeWarningLimit: 800 },
  },
});
