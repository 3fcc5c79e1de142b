import { mkdirSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { openInstallation, saveInstallation } from "./installation";

let folder: string;
const open = () => openInstallation(folder, 4811);
const file = () => join(folder, "installation.json");

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "installation-"));
});

afterEach(() => rmSync(folder, { recursive: true }));

test("a new folder gets secrets of its own, which nobody else can read and which stay", () => {
  const first = open();
  expect(first.ready).toBe(false);
  expect(new Set(Object.values(first.secrets)).size).toBe(5);
  expect(statSync(file()).mode & 0o777).toBe(0o600);
  expect(openInstallation(folder, 9000)).toEqual(first);
});

test("a folder with a database but without its passwords is half made", () => {
  mkdirSync(join(folder, "mariadb"));
  expect(open).toThrow(/half made: it holds mariadb but no installation\.json.*mv /);
});

test("a database that is not whole, or gone, is half made", () => {
  saveInstallation(folder, { ...open(), ready: true });
  expect(open).toThrow(/is gone/);
  mkdirSync(join(folder, "mariadb/mysql"), { recursive: true });
  expect(open).toThrow(/not whole/);
  writeFileSync(join(folder, "mariadb/ibdata1"), "");
  expect(open().ready).toBe(true);
});

test("an installation file cut short is half made and left as it is", () => {
  open();
  writeFileSync(file(), '{"signInPort":');
  expect(open).toThrow(/can't be read/);
  expect(readFileSync(file(), "utf8")).toBe('{"signInPort":');
});

test("a first start that broke off before its database was made can be repeated", () => {
  open();
  mkdirSync(join(folder, "mariadb.unfinished"));
  expect(open().ready).toBe(false);
});
