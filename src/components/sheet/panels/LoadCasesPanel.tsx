import { Button } from "~/components/ui/Button";
import { addLoadCase, mayReverse, renameLoadCase, setFactor } from "~/sheet/edits/load-cases";
import { removeLoadCase } from "~/sheet/edits/remove";
import { numberText, readNumber } from "~/sheet/read-number";
import { CellInput } from "../tables/CellInput";
import { useDocument, useEditable, useSheetStore } from "../store";

/** Factors of each circuit and each piece of equipment in each load case; each limit is judged in every one of them. */
export function LoadCasesPanel() {
  const store = useSheetStore();
  const document = useDocument();
  const disabled = !useEditable();
  const { loadCases, circuits, equipment } = document;
  return (
    <div className="grid gap-3">
      {loadCases.length === 0 ? (
        <p className="text-sm text-muted">No load case: currents count as entered.</p>
      ) : (
        <div className="table-scroll">
          <table className="table">
            <caption className="sr-only">Factor of each source in each load case</caption>
            <thead>
              <tr>
                <th scope="col">Source</th>
                {loadCases.map(({ id, name }) => (
                  <th key={id} scope="col">
                    <CellInput
                      label={`Name of load case ${name}`}
                      value={name}
                      disabled={disabled}
                      onCommit={(text) => {
                        if (text.length > 300) return "At most 300 letters.";
                        store.edit("Name of load case", (whole) => renameLoadCase(whole, id, text));
                        return null;
                      }}
                    />
                    {!disabled && (
                      <Button
                        small
                        kind="quiet"
                        aria-label={`Delete load case ${name}`}
                        onClick={() => store.edit(`Delete ${name}`, (whole) => removeLoadCase(whole, id))}
                      >
                        Delete
                      </Button>
                    )}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {[...circuits, ...equipment].map((source) => (
                <tr key={source.id}>
                  <th scope="row">{source.name}</th>
                  {loadCases.map((loadCase) => (
                    <td key={loadCase.id}>
                      <CellInput
                        label={`Factor of ${source.name} in ${loadCase.name}`}
                        value={numberText(loadCase.factors[source.id] ?? 1)}
                        numeric
                        disabled={disabled}
                        onCommit={(text) => {
                          const factor = readNumber(text);
                          if (factor === null || Math.abs(factor) > 1e6) return "Type a factor, such as 0.7.";
                          if (factor < 0 && !mayReverse(document, source.id))
                            return "Only DC can be reversed.";
                          store.edit(`Factor of ${source.name}`, (whole) =>
                            setFactor(whole, loadCase.id, source.id, factor),
                          );
                          return null;
                        }}
                      />
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      {!disabled && (
        <Button small className="justify-self-start" onClick={() => store.edit("Add load case", addLoadCase)}>
          Add a load case
        </Button>
      )}
    </div>
  );
}
