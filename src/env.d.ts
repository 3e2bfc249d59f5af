/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    /** Who is signed in, or null; set by the middleware. */
    actor: import('./lib/server/auth/actor').Actor | null;
    /** What pages show of the person: name, studio, units, theme. Null when nobody is signed in. */
    me: import('./lib/contracts/auth').Me | null;
    requestId: string;
    /** What an error page shows; null where nothing went wrong. */
    problem: { readonly status: number; readonly title: string; readonly detail: string } | null;
  }
}
