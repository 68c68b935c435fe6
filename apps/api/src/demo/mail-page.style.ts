export const style = `
:root {
  color-scheme: light dark;
  --paper: #f7f5f0;
  --sheet: #fffdf9;
  --rule: #d9d4c7;
  --graphite: #22262b;
  --pencil: #5b626b;
  --marking: #1d3f72;
}
@media (prefers-color-scheme: dark) {
  :root {
    --paper: #0d1b2a;
    --sheet: #13263a;
    --rule: #2b4158;
    --graphite: #e8e6df;
    --pencil: #a5b1bd;
    --marking: #8fb4e8;
  }
}
* { box-sizing: border-box; }
body {
  margin: 0;
  background: var(--paper);
  color: var(--graphite);
  font: 16px/1.5 'Atkinson Hyperlegible Next Variable', 'Atkinson Hyperlegible Next', system-ui, sans-serif;
}
header {
  display: flex;
  flex-wrap: wrap;
  gap: 4px 16px;
  padding: 12px 16px;
  border-bottom: 1px solid var(--rule);
  background: var(--sheet);
  color: var(--pencil);
}
main { max-width: 1040px; padding: 16px; overflow-wrap: anywhere; }
h1 { margin: 8px 0; font-size: 22px; line-height: 28px; }
h2 { font-size: 17px; }
a { color: var(--marking); }
:focus-visible { outline: 2px solid var(--marking); outline-offset: 2px; }
form { display: flex; flex-wrap: wrap; gap: 8px; align-items: center; margin: 16px 0; }
input, button {
  min-height: 32px;
  padding: 4px 8px;
  border: 1px solid var(--pencil);
  border-radius: 3px;
  background: var(--sheet);
  color: var(--graphite);
  font: inherit;
}
button { cursor: pointer; }
table { width: 100%; border-collapse: collapse; background: var(--sheet); }
caption { padding: 4px 0; color: var(--pencil); font-size: 14px; text-align: left; }
th, td { height: 32px; padding: 4px 8px; border: 1px solid var(--rule); text-align: left; vertical-align: top; }
th, dt { color: var(--pencil); font-size: 14px; font-weight: 400; }
td time { white-space: nowrap; }
time { font-family: 'Atkinson Hyperlegible Mono Variable', ui-monospace, monospace; font-size: 14px; }
dl { margin: 16px 0; border: 1px solid var(--rule); background: var(--sheet); }
dl div { padding: 4px 8px; border-bottom: 1px solid var(--rule); }
dl div:last-child { border-bottom: 0; }
dd { margin: 0; }
article { padding: 16px; border: 1px solid var(--rule); background: var(--sheet); white-space: pre-wrap; }
@media (max-width: 640px) {
  thead { position: absolute; clip-path: inset(50%); }
  tr { display: block; padding: 8px; border: 1px solid var(--rule); }
  td { display: block; height: auto; padding: 0; border: 0; }
}
@media print { form, nav { display: none; } }
`;
