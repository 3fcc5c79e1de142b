import type { EarthField } from "~/domain/plan-document/earth-field";

/** What the page tells the sheet. */
export interface SheetProps {
  planId: string;
  planName: string;
  userId: string;
  /** Whether this person may change the plan. */
  mayEdit: boolean;
  /** Whether this person may have it screened. */
  mayScreen: boolean;
  /** The Earth's field at the site today; null where the site has no place. */
  siteEarth: EarthField | null;
  /** What the site calls its phases, such as "L1/L2/L3". */
  phaseLabels: string;
}
