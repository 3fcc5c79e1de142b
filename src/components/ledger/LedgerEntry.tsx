import { BudgetBar } from "~/components/ui/BudgetBar";
import { NeedleMark } from "~/components/ui/NeedleMark";
import { Verdict } from "~/components/ui/Verdict";
import { formatBudget, formatLimit, formatQuantity, formatShare, quantityText } from "~/domain/format";
import type { LoadCase } from "~/domain/plan-document/plan-document";
import { loadCaseName, type Position } from "~/domain/positions";
import type { DrawnSource } from "~/domain/sources";

interface Props {
  position: Position;
  loadCases: readonly LoadCase[];
  find: (sourceId: string) => DrawnSource;
  litId: string | null;
  onLight: (circuitId: string | null) => void;
  selected: boolean;
  onSelect: (sensorId: string) => void;
}

/** Spenders named in words below the bar. */
const namedSpenders = 3;

export function LedgerEntry({ position, loadCases, find, litId, onLight, selected, onSelect }: Props) {
  const { sensor, verdict, governing: finding } = position;
  if (finding === undefined) return null;
  const { name } = sensor;
  const parts = finding.contributions.map(({ id, part }) => ({ ...find(id), part }));
  const spenders = parts
    .filter(({ part }) => Math.abs(part) >= 0.005)
    .sort((a, b) => Math.abs(b.part) - Math.abs(a.part));
  const loadCase = loadCaseName(loadCases, finding.loadCaseId);
  return (
    <li
      className={`border-l-4 py-1.5 pl-2 pr-1 ${selected ? "border-accent bg-raised" : "border-transparent"}`}
      data-sensor-id={sensor.id}
    >
      <div className="flex items-start gap-2">
        <NeedleMark budgetUsed={finding.budgetUsed} verdict={verdict} title="" />
        <div className="min-w-0 flex-1">
          <div className="flex flex-wrap items-baseline justify-between gap-x-2">
            <button
              type="button"
              className="min-h-6 cursor-pointer text-left font-semibold [overflow-wrap:anywhere] hover:underline"
              aria-pressed={selected}
              onClick={() => onSelect(sensor.id)}
            >
              {name}
            </button>
            <span className="text-sm">
              <Verdict verdict={verdict} />{" "}
              <span className="font-semibold">{formatBudget(finding.budgetUsed)}</span>
            </span>
          </div>
          <p className="text-sm text-muted">
            {quantityText(formatQuantity(finding.value, finding.unit, finding.expandedUncertainty))} of{" "}
            {formatLimit(finding.limit, finding.unit)}, {finding.measured}
            {loadCase !== null && `, in ${loadCase}`}
          </p>
        </div>
      </div>
      <div className="mt-1">
        <BudgetBar
          sensorName={name}
          budgetUsed={finding.budgetUsed}
          uncertaintyShare={finding.expandedUncertainty / finding.limit}
          parts={parts}
          litId={litId}
          onHover={onLight}
        />
      </div>
      <ul className="flex flex-wrap gap-x-3 text-sm" aria-label={`Who spends the budget of ${name}`}>
        {spenders.slice(0, namedSpenders).map(({ id, key, name: spender, part }) => (
          <li key={id}>
            <button
              type="button"
              className={`min-h-6 cursor-pointer text-left ${litId === id ? "text-accent underline" : ""}`}
              onPointerEnter={() => onLight(id)}
              onPointerLeave={() => onLight(null)}
              onFocus={() => onLight(id)}
              onBlur={() => onLight(null)}
            >
              <span className="source-key">{key}</span> {spender} {formatShare(part)}
              {part < 0 && " (relieves)"}
            </button>
          </li>
        ))}
        {spenders.length > namedSpenders && (
          <li className="self-center text-muted">and {spenders.length - namedSpenders} more</li>
        )}
      </ul>
    </li>
  );
}
