/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    /** Who sends the request, as the database says now; null when not signed in. */
    user: import('./server/context.ts').Caller | null;
  }
}
