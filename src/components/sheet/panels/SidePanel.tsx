import { useId, useState, type ReactNode } from "react";
import type { EarthField } from "~/domain/plan-document/earth-field";
import { isTraced } from "~/sheet/edits/circuits";
import { MapPanel } from "../map/MapPanel";
import { useDocument, useSelection } from "../store";
import { LoadCasesPanel } from "./LoadCasesPanel";
import { PlanPanel } from "./PlanPanel";
import { SelectedPanel } from "./SelectedPanel";
import { WaitingPanel } from "./WaitingPanel";

const tabs = ["selected", "map", "waiting", "load-cases", "plan"] as const;
type Tab = (typeof tabs)[number];

const titles: Record<Tab, string> = {
  selected: "Selected",
  map: "Field map",
  waiting: "Waiting",
  "load-cases": "Load cases",
  plan: "Plan",
};

interface Props {
  siteEarth: EarthField | null;
  onOpenSchedule: () => void;
}

/** What is selected and what holds for the plan, one at a time below the ledger. */
export function SidePanel({ siteEarth, onOpenSchedule }: Props) {
  const [tab, setTab] = useState<Tab>("selected");
  const selection = useSelection();
  const [shownFor, setShownFor] = useState(selection);
  const { circuits } = useDocument();
  const id = useId();
  // Whatever is selected next wants to be seen.
  if (selection !== shownFor) {
    setShownFor(selection);
    if (selection.length > 0) setTab("selected");
  }
  const waiting = circuits.filter((circuit) => !isTraced(circuit) || circuit.supply === null).length;
  const panels: Record<Tab, ReactNode> = {
    selected: <SelectedPanel />,
    map: <MapPanel />,
    waiting: <WaitingPanel onOpenSchedule={onOpenSchedule} />,
    "load-cases": <LoadCasesPanel />,
    plan: <PlanPanel siteEarth={siteEarth} />,
  };
  const move = (by: number) => {
    const next = tabs[(tabs.indexOf(tab) + by + tabs.length) % tabs.length] ?? tab;
    setTab(next);
    document.getElementById(`${id}-${next}`)?.focus();
  };
  return (
    <section
      aria-label="Properties"
      className="order-first flex min-h-0 flex-col lg:order-none lg:max-h-[58%]"
    >
      <div
        role="tablist"
        aria-label="Properties"
        className="flex flex-wrap gap-x-3 border-y border-rule px-3"
      >
        {tabs.map((name) => (
          <button
            key={name}
            id={`${id}-${name}`}
            role="tab"
            type="button"
            aria-selected={tab === name}
            aria-controls={`${id}-panel`}
            tabIndex={tab === name ? 0 : -1}
            className="min-h-9 cursor-pointer border-b-2 border-transparent text-sm aria-selected:border-accent aria-selected:font-semibold"
            onClick={() => setTab(name)}
            onKeyDown={(event) => {
              if (event.key === "ArrowRight") move(1);
              if (event.key === "ArrowLeft") move(-1);
            }}
          >
            {titles[name]}
            {name === "waiting" && waiting > 0 && ` (${waiting})`}
          </button>
        ))}
      </div>
      <div
        id={`${id}-panel`}
        role="tabpanel"
        aria-labelledby={`${id}-${tab}`}
        tabIndex={0}
        className="min-h-0 flex-1 overflow-y-auto p-3 outline-offset-[-3px]"
      >
        {panels[tab]}
      </div>
    </section>
  );
}
