import type { PlanDocumentInput } from "../../../src/domain/plan-document/plan-document";

type Routes = NonNullable<PlanDocumentInput["routes"]>;

/** The tray that several circuits share; metres from the datum, heights from the finished floor. */
export const routes = [
  {
    id: "tray-t2",
    name: "Tray T2, instrument hall",
    path: [
      [12.8, 1.9, 3.6],
      [12.8, 9.9, 3.6],
      [20.4, 9.9, 3.6],
      [20.4, 28.9, 3.6],
      [37.5, 28.9, 3.6],
    ],
  },
] satisfies Routes;
