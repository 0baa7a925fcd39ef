import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'astro/config';

/**
 * Every page is rendered on request; our own server (scripts/serve.ts) stands around the handler. Requests from other
 * sites are refused in src/middleware.ts: the built-in check lets JSON through and knows nothing of a proxy.
 */
export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'middleware' }),
  integrations: [react()],
  session: { driver: 'memory' },
  security: { checkOrigin: false },
  devToolbar: { enabled: false },
  compressHTML: true,
  experimental: {
    // A header in the built server only. Script and style sources are 'self' and the hashes of what Astro itself puts in.
    csp: {
      directives: [
        "default-src 'self'",
        "img-src 'self' data:",
        "font-src 'self'",
        "connect-src 'self'",
        "object-src 'none'",
        "base-uri 'none'",
        "frame-ancestors 'none'",
        "form-action 'self'",
      ],
    },
  },
  vite: {
    plugins: [tailwindcss()],
    build: {
      // Inlined fonts and images would need data: sources in the content security policy.
      assetsInlineLimit: 0,
      rollupOptions: {
        // zod's annotations are placed where Rollup cannot use them: thousands of lines about nothing.
        onwarn: (warning, warn) => (warning.code === 'INVALID_ANNOTATION' ? undefined : warn(warning)),
      },
    },
    ssr: { external: ['better-sqlite3', '@node-rs/argon2', 'tinypool', 'pino'] },
  },
});
