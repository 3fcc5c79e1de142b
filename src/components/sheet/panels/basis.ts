import type { Circuit } from "~/domain/plan-document/circuit";

const basisLabels: Record<Circuit["currentBasis"], string> = {
  measured: "measured",
  "load-list": "load list",
  "rating-plate": "rating plate",
  breaker: "breaker rating (upper bound)",
  assumed: "assumed",
};

export const basisOptions = (Object.keys(basisLabels) as Circuit["currentBasis"][]).map((value) => ({
  value,
  label: basisLabels[value],
}));
