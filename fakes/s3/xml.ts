import type { S3Error } from "./errors";

const namespace = "http://s3.amazonaws.com/doc/2006-03-01/";
const declaration = '<?xml version="1.0" encoding="UTF-8"?>\n';

export type XmlNode = string | number | boolean | XmlTree | readonly XmlTree[];
export interface XmlTree {
  [name: string]: XmlNode | undefined;
}

function escapeText(text: string): string {
  return text.replace(/[&<>"\r]/g, (character) => `&#${character.charCodeAt(0)};`);
}

function element(name: string, node: XmlNode | undefined): string {
  if (node === undefined) return "";
  if (Array.isArray(node)) return node.map((child: XmlTree) => element(name, child)).join("");
  if (typeof node === "object") return `<${name}>${children(node as XmlTree)}</${name}>`;
  return `<${name}>${escapeText(String(node))}</${name}>`;
}

const children = (tree: XmlTree): string =>
  Object.entries(tree)
    .map(([name, node]) => element(name, node))
    .join("");

export const document = (root: string, tree: XmlTree): string =>
  `${declaration}<${root} xmlns="${namespace}">${children(tree)}</${root}>`;

export function errorDocument(error: S3Error, resource: string, requestId: string): string {
  const tree: XmlTree = {
    Code: error.code,
    Message: error.message,
    ...error.detail,
    Resource: resource,
    RequestId: requestId,
  };
  return `${declaration}<Error>${children(tree)}</Error>`;
}
