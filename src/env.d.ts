/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    /** Who sends the request, as the database says now; null when not signed in. */
    user: import('./server/context.ts').Caller | null;
    /** By a session or by a token; null when not signed in. */
    by: import('./server/auth/identity.ts').Admission | null;
  }
}
