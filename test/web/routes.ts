import type { Express } from "express";

export interface Route {
  readonly method: "get" | "post";
  /** as it is declared: /cases/:id */
  readonly path: string;
}

/** What Express keeps of a route or a router; its type definitions leave out some of it. */
interface Layer {
  readonly route?: { readonly path: string | string[]; readonly methods: Readonly<Record<string, boolean>> };
  readonly handle: { readonly stack?: readonly Layer[] };
  /** true: it takes every path */
  readonly slash: boolean;
  match(path: string): boolean;
}

/** Where routers may be mounted. */
const mounts = ["/api"];

/** Every route that an application declares, so that a new one is tried like the others. */
export function routesOf(app: Express): readonly Route[] {
  return routesIn(app.router.stack as unknown as readonly Layer[], "");
}

function routesIn(layers: readonly Layer[], prefix: string): readonly Route[] {
  return layers.flatMap((layer) => {
    const { route } = layer;
    if (route !== undefined) {
      const methods = (["get", "post"] as const).filter((method) => route.methods[method]);
      return [route.path]
        .flat()
        .flatMap((path) => methods.map((method) => ({ method, path: prefix + path })));
    }
    const inner = layer.handle.stack;
    return inner === undefined ? [] : routesIn(inner, prefix + mountOf(layer));
  });
}

function mountOf(layer: Layer): string {
  if (layer.slash) return "";
  const mount = mounts.find((each) => layer.match(`${each}/any`));
  if (mount === undefined) throw new Error("A router is mounted where these tests do not know of it.");
  return mount;
}
