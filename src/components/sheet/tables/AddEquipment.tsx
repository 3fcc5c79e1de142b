import { useState } from "react";
import { Button } from "~/components/ui/Button";
import { Field } from "~/components/ui/Field";
import { Select } from "~/components/ui/Select";
import { addEquipment, equipmentStems } from "~/sheet/edits/equipment";
import { beginDraft, draftInputs, readDraft, typeDraft } from "~/sheet/edits/equipment-draft";
import { freeName } from "~/sheet/edits/ids";
import { useSheetStore } from "../store";

/** Adds a piece of equipment at the origin, with the figures that nothing else could give. */
export function AddEquipment() {
  const store = useSheetStore();
  const [draft, setDraft] = useState(() => beginDraft("coil"));
  const add = () => {
    const { document } = store.get().session;
    const name = freeName(equipmentStems[draft.kind], document.equipment);
    const read = readDraft(draft, name, [0, 0, 0]);
    if (!read.ok) {
      setDraft(read.draft);
      return;
    }
    const { item } = read;
    store.edit(`Add ${name}`, (whole) => addEquipment(whole, item), [{ kind: "equipment", id: item.id }]);
    setDraft(beginDraft(draft.kind));
  };
  return (
    <form
      className="flex flex-wrap items-end gap-x-3 gap-y-1"
      aria-label="Add equipment"
      onSubmit={(event) => {
        event.preventDefault();
        add();
      }}
    >
      {draftInputs(draft).map(({ id, label, value, unit, choices, problem }) =>
        choices === undefined ? (
          <Field
            key={id}
            id={`add-equipment-${id}`}
            className="w-36"
            label={label}
            unit={unit}
            value={value}
            error={problem}
            small
            inputMode="decimal"
            autoComplete="off"
            onChange={(event) => setDraft(typeDraft(draft, id, event.target.value))}
          />
        ) : (
          <Select
            key={id}
            id={`add-equipment-${id}`}
            label={label}
            value={value}
            options={choices}
            small
            onChange={(event) => setDraft(typeDraft(draft, id, event.target.value))}
          />
        ),
      )}
      <Button small type="submit">
        Add at x 0, y 0
      </Button>
    </form>
  );
}
