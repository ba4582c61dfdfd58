/** Written by scripts/build/registry.mjs from the files under server/api. */
declare module '#routes' {
  import type { EventHandler } from 'h3'

  export interface RegisteredRoute {
    method: 'get' | 'post' | 'put' | 'patch' | 'delete'
    /** As OpenAPI writes it: /api/v1/projects/{project} */
    path: string
    load: () => Promise<EventHandler>
  }
  export const routes: RegisteredRoute[]
  /** Routes under /api that libraries bring along. */
  export const libraryRoutes: string[]
}
