import { CircuitsTable } from "./CircuitsTable";
import { EquipmentTable } from "./EquipmentTable";
import { RoutesTable } from "./RoutesTable";
import { SensorsTable } from "./SensorsTable";
import { LoadCasesPanel } from "../panels/LoadCasesPanel";

/** Everything on the drawing as tables: the way for keyboard and screen reader, and for whoever has figures. */
export function Tables() {
  return (
    <div
      className="grid min-h-0 flex-1 content-start gap-8 overflow-y-auto p-4"
      tabIndex={0}
      role="region"
      aria-label="Tables"
    >
      <section aria-labelledby="routes-title">
        <h2 id="routes-title" className="mb-2">
          Routes
        </h2>
        <RoutesTable />
      </section>
      <section aria-labelledby="circuits-title">
        <h2 id="circuits-title" className="mb-2">
          Circuits
        </h2>
        <CircuitsTable />
      </section>
      <section aria-labelledby="sensors-title">
        <h2 id="sensors-title" className="mb-2">
          Sensors
        </h2>
        <SensorsTable />
      </section>
      <section aria-labelledby="equipment-title">
        <h2 id="equipment-title" className="mb-2">
          Equipment
        </h2>
        <EquipmentTable />
      </section>
      <section aria-labelledby="load-cases-title">
        <h2 id="load-cases-title" className="mb-2">
          Load cases
        </h2>
        <LoadCasesPanel />
      </section>
    </div>
  );
}
