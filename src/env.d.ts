/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    /** Who asks: pass it to the services of #server/*. */
    viewer: import('#server/viewer.ts').Viewer;
    /** Short for viewer.user: null for a visitor. */
    user: import('#server/viewer.ts').SessionUser | null;
    /** Also in the response header X-Request-Id and in the log. */
    requestId: string;
    /** The peer's address as our own server trusts it; absent under the development server. */
    address?: string;
    /** From the cookie "theme"; system when unset. Put it on <html data-theme>. */
    theme: 'system' | 'light' | 'dark';
    /** Gives this browser a visitor cookie when it has none, and updates viewer.visitor. */
    becomeVisitor(): void;
  }
}
