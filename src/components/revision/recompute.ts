import { callApi } from "~/client/api";
import { recomputedAnswer } from "~/domain/answers/revisions";

type Answer = ReturnType<typeof recomputedAnswer.parse>;

function sentences({ engineVersion, engineVersionThen, sameBytes, ...answer }: Answer): string[] {
  if (sameBytes) return [`The same bytes again, by engine ${engineVersion}.`];
  const { largestDifference, changedVerdicts } = answer;
  const difference =
    largestDifference === null
      ? "The results do not have the same findings."
      : `The largest relative difference is ${largestDifference.toExponential(1).replace("-", "\u2212")}.`;
  const engines =
    engineVersion === engineVersionThen
      ? `The bytes differ although the engine is ${engineVersion} as then: report this.`
      : `Engine ${engineVersion}, then ${engineVersionThen}.`;
  const verdicts =
    changedVerdicts.length === 0
      ? ["No verdict changed."]
      : changedVerdicts.map(
          ({ sensorName, before, after }) =>
            `${sensorName}: ${before ?? "not there"}, now ${after ?? "not there"}.`,
        );
  return [engines, difference, ...verdicts];
}

// Shown by this script alone: without it the button could not say what came of it.
for (const button of document.querySelectorAll<HTMLButtonElement>("[data-recompute]")) {
  const place = document.querySelector<HTMLElement>("[data-recomputed]");
  button.hidden = false;
  button.addEventListener("click", () => {
    button.disabled = true;
    void callApi(button.dataset["recompute"] ?? "", recomputedAnswer, { method: "POST" })
      .then(sentences)
      .catch((error: unknown) => [error instanceof Error ? error.message : String(error)])
      .then((lines) => {
        place?.replaceChildren(...lines.map(paragraph));
        button.disabled = false;
      });
  });
}

function paragraph(text: string): HTMLElement {
  const element = document.createElement("p");
  element.textContent = text;
  return element;
}
