/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    /** Who makes the request; its user is null for a visitor. */
    actor: import('~/server/actor').Actor;
    user: import('~/server/actor').ActorUser | null;
    session: { readonly id: string; readonly expires_at: Date } | null;
    /** The chosen theme; null leaves it to the browser's setting. */
    theme: 'light' | 'dark' | null;
    /** Why a page of a project that the actor may see is not shown. */
    refused?: { readonly words: string; readonly slug: string };
  }
}
