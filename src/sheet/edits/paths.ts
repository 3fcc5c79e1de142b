import type { Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { tidyM, type Point3 } from "../geometry";

type Path = NonNullable<Circuit["path"]>;

/** Whose vertices they are: a route's, or those of a circuit with a path of its own. */
export interface PathOwner {
  list: "routes" | "circuits";
  id: string;
}

export interface OwnedPath {
  owner: PathOwner;
  name: string;
  path: Path;
}

export const sameOwner = (a: PathOwner, b: PathOwner): boolean => a.list === b.list && a.id === b.id;

/** Every path that is drawn, routes first. */
export const ownedPaths = (document: PlanDocument): OwnedPath[] => [
  ...document.routes.map(({ id, name, path }) => ({ owner: { list: "routes" as const, id }, name, path })),
  ...document.circuits.flatMap(({ id, name, path }) =>
    path === null ? [] : [{ owner: { list: "circuits" as const, id }, name, path }],
  ),
];

export const pathOf = (document: PlanDocument, owner: PathOwner): Path | null =>
  document[owner.list].find(({ id }) => id === owner.id)?.path ?? null;

/** Whose path a circuit follows; null while it is not traced. */
export function ownerOfCircuit(circuit: Circuit): PathOwner | null {
  if (circuit.route !== null) return { list: "routes", id: circuit.route.id };
  return circuit.path === null ? null : { list: "circuits", id: circuit.id };
}

/** The circuits that follow a path. */
export const circuitsOn = (document: PlanDocument, owner: PathOwner): Circuit[] =>
  document.circuits.filter((circuit) => {
    const own = ownerOfCircuit(circuit);
    return own !== null && sameOwner(own, owner);
  });

export const tidyPoint = ([x, y, z]: Point3): [number, number, number] => [tidyM(x), tidyM(y), tidyM(z)];

export function withPath(document: PlanDocument, owner: PathOwner, path: readonly Point3[]): PlanDocument {
  const tidied = path.map(tidyPoint);
  return owner.list === "routes"
    ? {
        ...document,
        routes: document.routes.map((item) => (item.id === owner.id ? { ...item, path: tidied } : item)),
      }
    : {
        ...document,
        circuits: document.circuits.map((item) => (item.id === owner.id ? { ...item, path: tidied } : item)),
      };
}

/** Changes one vertex of a path; a vertex that is not there changes nothing. */
export function withVertex(
  document: PlanDocument,
  owner: PathOwner,
  index: number,
  to: Point3,
): PlanDocument {
  const path = pathOf(document, owner);
  if (path?.[index] === undefined) return document;
  return withPath(
    document,
    owner,
    path.map((vertex, i) => (i === index ? to : vertex)),
  );
}

/** Puts a vertex after the one at `index`. */
export function insertVertex(
  document: PlanDocument,
  owner: PathOwner,
  index: number,
  at: Point3,
): PlanDocument {
  const path = pathOf(document, owner);
  if (path === null) return document;
  return withPath(document, owner, [...path.slice(0, index + 1), at, ...path.slice(index + 1)]);
}

/** Takes a vertex out; a path keeps at least two. */
export function removeVertex(document: PlanDocument, owner: PathOwner, index: number): PlanDocument {
  const path = pathOf(document, owner);
  if (path === null || path.length <= 2) return document;
  return withPath(
    document,
    owner,
    path.filter((_, i) => i !== index),
  );
}
