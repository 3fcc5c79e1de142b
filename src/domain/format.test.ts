import { describe, expect, it } from "vitest";
import {
  formatBudget,
  formatCurrent,
  formatField,
  formatLimit,
  formatNumber,
  formatQuantity,
  formatShare,
  quantityText,
} from "./format";

const plain = (text: string) => text.replaceAll("\u00a0", " ");

describe("formatQuantity", () => {
  it("ends value and uncertainty at the uncertainty's second digit", () => {
    expect(formatQuantity(1.4234e-6, "T", 1.12e-7)).toEqual({
      value: "1.42",
      uncertainty: "0.11",
      unit: "µT",
    });
    expect(formatQuantity(7.3e-9, "T", 9.96e-10)).toEqual({ value: "7.3", uncertainty: "1.0", unit: "nT" });
    expect(formatQuantity(8.124e-5, "T", 1.34e-5)).toEqual({ value: "81", uncertainty: "13", unit: "µT" });
  });

  it("shows three digits where there is no uncertainty", () => {
    expect(plain(formatField(5e-7))).toBe("500 nT");
    expect(plain(formatField(1.26e-6))).toBe("1.26 µT");
    expect(plain(formatField(0.0031))).toBe("3.10 mT");
    expect(plain(formatField(2.5))).toBe("2.50 T");
    expect(plain(formatField(0))).toBe("0 nT");
  });

  it("takes the next prefix where rounding lifts the value to it", () => {
    expect(plain(formatField(9.9996e-7))).toBe("1.00 µT");
    expect(plain(formatField(9.99e-7))).toBe("999 nT");
  });

  it("takes the prefix from the uncertainty where that is greater", () => {
    expect(formatQuantity(2e-8, "T", 1.5e-6)).toEqual({ value: "0.0", uncertainty: "1.5", unit: "µT" });
  });

  it("writes degrees without a space and brackets them with their uncertainty", () => {
    expect(quantityText(formatQuantity(2.34, "deg"))).toBe("2.34°");
    expect(plain(quantityText(formatQuantity(2.34, "deg", 0.21)))).toBe("(2.34 ± 0.21)°");
  });

  it("keeps the metre of a gradient", () => {
    expect(plain(quantityText(formatQuantity(6e-7, "T/m", 2e-8)))).toBe("600 ± 20 nT/m");
  });
});

describe("numbers", () => {
  it("uses a true minus sign and never a negative zero", () => {
    expect(formatNumber(-1.25, 1)).toBe("\u22121.3");
    expect(formatNumber(-0.001, 2)).toBe("0.00");
  });

  it("writes limits as they were typed", () => {
    expect(plain(formatLimit(1e-6, "T"))).toBe("1 µT");
    expect(plain(formatLimit(9.4e-8, "T"))).toBe("94 nT");
    expect(formatLimit(0.5, "deg")).toBe("0.5°");
  });

  it("writes budgets, shares and currents", () => {
    expect(plain(formatBudget(1.423))).toBe("142 %");
    expect(plain(formatBudget(0.0423))).toBe("4.2 %");
    expect(plain(formatBudget(0.0996))).toBe("10 %");
    expect(plain(formatBudget(0.0002))).toBe("under 0.1 %");
    expect(plain(formatShare(-0.0723))).toBe("\u22127.2 %");
    expect(plain(formatCurrent(120))).toBe("120 A");
    expect(plain(formatCurrent(12.5))).toBe("12.5 A");
  });
});
