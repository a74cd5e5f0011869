import type { Express, Router } from 'express';
import type { Requirement, StatesRequirement } from '../access/require';

export interface RouteOfApp {
  readonly method: string;
  /** As declared, parameters with a colon. */
  readonly path: string;
  /** What the route's handlers say it asks of its caller; undefined when they say nothing, which is a mistake. */
  readonly requirement: Requirement | undefined;
}

interface Layer {
  readonly handle: Partial<StatesRequirement> & { readonly stack?: readonly Layer[] };
  readonly route?: {
    readonly path: string;
    readonly methods: Readonly<Record<string, boolean>>;
    readonly stack: readonly Layer[];
  };
}

/** Every route under /api of an app whose routers are mounted without a path of their own. */
export function routesOf(app: Express): RouteOfApp[] {
  const walk = (router: { readonly stack: readonly Layer[] }): RouteOfApp[] =>
    router.stack.flatMap((layer) => {
      const { route } = layer;
      if (!route) return layer.handle.stack ? walk({ stack: layer.handle.stack }) : [];
      return Object.keys(route.methods).map((method) => ({
        method: method.toUpperCase(),
        path: route.path,
        requirement: route.stack.map(({ handle }) => handle.requirement).find((found) => found !== undefined),
      }));
    });
  return walk(app.router as Router & { readonly stack: readonly Layer[] }).filter((route) =>
    route.path.startsWith('/api/'),
  );
}
