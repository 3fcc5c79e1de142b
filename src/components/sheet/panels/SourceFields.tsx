import { CommitField } from "../inputs/CommitField";
import { NumberField } from "../inputs/NumberField";

/** Id of whatever is fed together; an empty text stands for none. */
export const groupProblem = (text: string): string | null =>
  text.length > 100 || text.trim() === "__proto__" ? "At most 100 letters." : null;

interface Props {
  source: string | null;
  shieldingFactor: number;
  disabled: boolean;
  onSource: (source: string | null) => void;
  onShielding: (shieldingFactor: number) => void;
}

/** What feeds it, and by how much its field is said to be weakened. */
export function SourceFields({ source, shieldingFactor, disabled, onSource, onShielding }: Props) {
  return (
    <div className="grid grid-cols-2 gap-3">
      <CommitField
        label="Source"
        value={source ?? ""}
        placeholder="its own"
        hint="What feeds it. One name, one phase reference; empty: its own."
        disabled={disabled}
        onCommit={(text) => {
          const problem = groupProblem(text);
          if (problem === null) onSource(text.trim() === "" ? null : text.trim());
          return problem;
        }}
      />
      <NumberField
        label="Shielding factor"
        least={0}
        most={1000}
        value={shieldingFactor}
        hint="What is left of its field: 1 is all of it. The user’s own assertion; nothing here checks it."
        disabled={disabled}
        onChange={onShielding}
      />
    </div>
  );
}
