import { useMemo, useState } from "react";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { changeWords, compare, merge, type Piece, type Side } from "~/sheet/merge";
import type { PlanDocument } from "~/domain/plan-document/plan-document";

interface Props {
  base: PlanDocument;
  mine: PlanDocument;
  theirs: PlanDocument;
  theirName: string;
  onMerged: (merged: PlanDocument) => void;
}

const listWords: Record<Piece["list"], string> = {
  routes: "route",
  circuits: "circuit",
  equipment: "equipment",
  sensors: "sensor",
  loadCases: "load case",
  plan: "the plan’s",
  drawing: "the drawing’s",
};

const settingWords: Record<string, string> = {
  name: "name",
  frame: "north",
  earthField: "Earth’s field",
  unknownPhase: "unknown phase",
  sheet: "image",
  schedule: "cable schedule",
};

const titleOf = ({ list, name }: Piece): string =>
  list === "plan" || list === "drawing"
    ? `${listWords[list]} ${settingWords[name] ?? name}`
    : `${listWords[list]} ${name}`;

/** Two people saved: shows what each changed and lets one choose, object by object. Nothing is lost before that. */
export function ConflictDialog({ base, mine, theirs, theirName, onMerged }: Props) {
  const { conflicts, onlyMine, onlyTheirs } = useMemo(
    () => compare(base, mine, theirs),
    [base, mine, theirs],
  );
  const [choices, setChoices] = useState<Record<string, Side>>({});
  // Closing is no choice: the dialogue stays in reach behind a button.
  const [open, setOpen] = useState(true);
  const all = (side: Side) => setChoices(Object.fromEntries(conflicts.map(({ key }) => [key, side])));
  return (
    <>
      {!open && (
        <div className="message message-over mx-3 my-2 flex flex-wrap items-center gap-3" role="alert">
          <p>
            {theirName} saved this plan while you worked on it. Your changes are kept here until you choose.
          </p>
          <Button small onClick={() => setOpen(true)}>
            Compare and choose
          </Button>
        </div>
      )}
      <Dialog open={open} title="Somebody else saved this plan too" onClose={() => setOpen(false)}>
        <div className="grid gap-4 text-sm">
          <p>
            {theirName} saved the plan after you opened it. What only one of you changed is taken from whoever
            changed it.
            {conflicts.length > 0 && " Of what you both changed, choose whose stands."}
          </p>
          {conflicts.length > 0 && (
            <section className="grid gap-2">
              <h3>Changed by both</h3>
              <div className="flex flex-wrap gap-2">
                <Button small onClick={() => all("mine")}>
                  Mine for all
                </Button>
                <Button small onClick={() => all("theirs")}>
                  Theirs for all
                </Button>
              </div>
              {conflicts.map((piece) => (
                <Choosing
                  key={piece.key}
                  piece={piece}
                  theirName={theirName}
                  side={choices[piece.key] ?? "mine"}
                  onChoose={(side) => setChoices({ ...choices, [piece.key]: side })}
                />
              ))}
            </section>
          )}
          <Changes title={`Changed by ${theirName} alone, taken in`} pieces={onlyTheirs} side="theirs" />
          <Changes title="Changed by you alone, kept" pieces={onlyMine} side="mine" />
          <div className="flex justify-end">
            <Button kind="primary" onClick={() => onMerged(merge(base, mine, theirs, choices))}>
              Merge and save
            </Button>
          </div>
        </div>
      </Dialog>
    </>
  );
}

interface ChoosingProps {
  piece: Piece;
  theirName: string;
  side: Side;
  onChoose: (side: Side) => void;
}

function Choosing({ piece, theirName, side, onChoose }: ChoosingProps) {
  const option = (value: Side, whose: string, what: unknown) => (
    <label className="flex items-baseline gap-2">
      <input
        type="radio"
        name={`choice-${piece.key}`}
        checked={side === value}
        onChange={() => onChoose(value)}
      />
      <span>
        <span className="font-semibold">{whose}</span> {changeWords(piece.base, what)}
      </span>
    </label>
  );
  return (
    <fieldset className="border border-rule-strong px-3 pb-2">
      <legend className="px-1 font-semibold">{titleOf(piece)}</legend>
      {option("mine", "Mine:", piece.mine)}
      {option("theirs", `${theirName}’s:`, piece.theirs)}
    </fieldset>
  );
}

function Changes({ title, pieces, side }: { title: string; pieces: readonly Piece[]; side: Side }) {
  if (pieces.length === 0) return null;
  return (
    <section>
      <h3>{title}</h3>
      <ul className="list-disc pl-5">
        {pieces.map((piece) => (
          <li key={piece.key}>
            {titleOf(piece)}: {changeWords(piece.base, piece[side])}
          </li>
        ))}
      </ul>
    </section>
  );
}
