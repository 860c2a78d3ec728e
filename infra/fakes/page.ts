import { escapeHtml } from './http';

// One plain look for the pages of both fakes: readable, in both schemes, without a script.
const style = `
:root { color-scheme: light dark; --ink: #1d2126; --soft: #55606b; --paper: #fbfaf7; --edge: #8b949e;
  --link: #14507d; --bad: #a3141c; --good: #14613a; }
@media (prefers-color-scheme: dark) { :root { --ink: #e9ebee; --soft: #b3bcc6; --paper: #171a1e;
  --edge: #707a85; --link: #8cc4f0; --bad: #ff9c9c; --good: #86d9a8; } }
* { box-sizing: border-box; }
body { margin: 0; background: var(--paper); color: var(--ink); font: 1rem/1.5 sans-serif; }
main, header { max-width: 60rem; margin: 0 auto; padding: 1rem; }
header { color: var(--soft); }
main.narrow { max-width: 28rem; }
a { color: var(--link); }
table { border-collapse: collapse; width: 100%; }
th, td { text-align: left; padding: .4rem .6rem .4rem 0; border-bottom: 1px solid var(--edge);
  vertical-align: top; overflow-wrap: anywhere; }
label { display: block; margin-top: 1rem; font-weight: 600; }
input { font: inherit; width: 100%; padding: .6rem; border: 1px solid var(--edge); border-radius: 4px;
  background: transparent; color: inherit; }
button { font: inherit; font-weight: 600; margin-top: 1.25rem; padding: .7rem 1.2rem; border: 0;
  border-radius: 4px; background: var(--link); color: var(--paper); cursor: pointer; }
:focus-visible { outline: 3px solid var(--link); outline-offset: 2px; }
iframe { width: 100%; height: 34rem; border: 1px solid var(--edge); background: #fff; }
pre { white-space: pre-wrap; overflow-wrap: anywhere; }
.problem { color: var(--bad); font-weight: 600; }
.amount { font-size: 1.6rem; font-weight: 600; }
.pair { display: grid; grid-template-columns: 1fr 1fr; gap: 1rem; }
dl { display: grid; grid-template-columns: max-content 1fr; gap: .2rem 1rem; }
dt { color: var(--soft); } dd { margin: 0; overflow-wrap: anywhere; }
`;

export function page(title: string, note: string, body: string, narrow = false): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)}</title>
<link rel="icon" href="data:,">
<style>${style}</style>
</head>
<body>
<header>${escapeHtml(note)}</header>
<main${narrow ? ' class="narrow"' : ''}>
${body}
</main>
</body>
</html>`;
}
