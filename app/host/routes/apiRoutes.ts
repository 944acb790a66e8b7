import { Hono } from 'hono';
import type { Services } from '../services.js';
import { chooserRoutes } from './chooser.js';
import { demonstrationRoutes } from './demonstration.js';
import { exportRoutes } from './exports.js';
import { folderRoutes } from './folders.js';
import { noteRoutes } from './notes.js';
import { presenceRoutes } from './presence.js';
import { recentRoutes } from './recent.js';
import { sessionRoutes } from './session.js';

/** What a shell decides about the routes. */
export interface RouteOptions {
  /** Offer the host's own folder chooser: for a shell that has no dialog of the system. */
  readonly folderChooser?: boolean;
  /** No folder was given at start: the page asks for the demonstration study. */
  readonly openDemonstration?: boolean;
}

/** Every address under /api, for both shells. */
export function apiRoutes(services: Services, options: RouteOptions) {
  return new Hono()
    .basePath('/api')
    .route('/', sessionRoutes(services, options.openDemonstration === true))
    .route('/', folderRoutes(services))
    .route('/', recentRoutes(services))
    .route('/', demonstrationRoutes(services))
    .route('/', noteRoutes(services))
    .route('/', exportRoutes())
    .route('/', presenceRoutes(services))
    .route('/', options.folderChooser === true ? chooserRoutes(services) : noChooser());
}

/** The type of the routes, for a typed client (`hc<HostApp>` of hono/client). */
export type HostApp = ReturnType<typeof apiRoutes>;

/** The same type as with the chooser, and no route. */
function noChooser(): ReturnType<typeof chooserRoutes> {
  return new Hono() as ReturnType<typeof chooserRoutes>;
}
