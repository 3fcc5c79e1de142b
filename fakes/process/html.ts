/** Text made safe for HTML, in attributes too. */
export const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);

/** The look that the fakes' pages share. */
export const pageStyle = `
:root { color-scheme: light dark; --paper: #f6f7f2; --ink: #17242b; --soft: #51616a; --rule: #c9d0cb; --accent: #1e6f66; --sheet: #fff; }
@media (prefers-color-scheme: dark) {
  :root { --paper: #12191d; --ink: #e4e9e4; --soft: #a3b0b2; --rule: #37444a; --accent: #7cc4b8; --sheet: #182227; }
}
* { box-sizing: border-box; }
body { margin: 0; background: var(--paper); color: var(--ink); font: 16px/1.5 "Source Sans 3", system-ui, sans-serif; }
main { max-width: 60rem; margin: 0 auto; padding: 2rem 1rem 4rem; }
h1 { font-size: 1.5rem; font-weight: 600; margin: 0 0 .25rem; overflow-wrap: anywhere; }
p.remark { color: var(--soft); margin: 0 0 1.5rem; }
a { color: var(--accent); text-underline-offset: .2em; }
:focus-visible { outline: 3px solid var(--accent); outline-offset: 2px; }
table { width: 100%; border-collapse: collapse; font-variant-numeric: tabular-nums; }
th, td { text-align: left; padding: .5rem .75rem .5rem 0; border-top: 1px solid var(--rule); vertical-align: top; overflow-wrap: anywhere; }
th { color: var(--soft); font-weight: 400; }
dl { display: grid; grid-template-columns: max-content 1fr; gap: .25rem 1rem; margin: 0 0 1.5rem; }
dt { color: var(--soft); } dd { margin: 0; overflow-wrap: anywhere; }
pre { white-space: pre-wrap; overflow-wrap: anywhere; background: var(--sheet); border: 1px solid var(--rule); padding: 1rem; margin: 0; font-size: .9rem; }
iframe { width: 100%; height: 70vh; border: 1px solid var(--rule); background: #fff; }
form.filter { display: flex; flex-wrap: wrap; gap: .5rem; margin: 0 0 1.5rem; align-items: end; }
label { display: block; color: var(--soft); font-size: .9rem; }
input { font: inherit; color: inherit; background: var(--sheet); border: 1px solid #7b8a86; padding: .5rem .75rem; min-width: min(22rem, 80vw); }
button { font: inherit; color: inherit; background: var(--sheet); border: 1px solid #7b8a86; padding: .5rem 1rem; cursor: pointer; }
button:hover { border-color: var(--accent); }
nav { display: flex; flex-wrap: wrap; gap: .25rem 1.25rem; margin: 0 0 1rem; }
nav [aria-current] { color: var(--ink); text-decoration: none; font-weight: 600; }
ul.people { list-style: none; margin: 0; padding: 0; border-bottom: 1px solid var(--rule); }
ul.people button { display: block; width: 100%; text-align: left; border: 0; border-top: 1px solid var(--rule); background: none; padding: .9rem .5rem; }
ul.people button:hover { background: var(--sheet); }
ul.people strong { display: block; font-weight: 600; }
ul.people span { display: block; color: var(--soft); overflow-wrap: anywhere; }
`;

export const page = (title: string, body: string): string => `<!doctype html>
<html lang="en-GB">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)}</title>
<link rel="icon" href="data:,">
<style>${pageStyle}</style>
</head>
<body><main>${body}</main></body>
</html>
`;
