/** Style of the printed report: black on white, a table's head on every sheet, nothing that needs colour to be read. */
export const reportStyle = `
:root { color-scheme: light; }
body { font: 14px/1.45 system-ui, -apple-system, "Segoe UI", Helvetica, Arial, sans-serif; color: #1b1b1b; background: #fff; margin: 0 auto; padding: 32px 28px 64px; max-width: 1080px; }
h1 { font-size: 26px; line-height: 1.2; margin: 0 0 4px; }
h2 { font-size: 19px; margin: 40px 0 10px; padding-top: 10px; border-top: 2px solid #1b1b1b; }
h3 { font-size: 15px; margin: 24px 0 6px; }
p { margin: 6px 0; }
.quiet, caption, footer { color: #555; }
.caution { border: 1.5px solid #1b1b1b; padding: 10px 14px; margin: 18px 0; }
nav ol { columns: 2; padding-left: 20px; margin: 8px 0; }
a { color: #123f73; }
table { border-collapse: collapse; width: 100%; margin: 10px 0 16px; font-size: 12.5px; }
caption { text-align: left; padding: 0 0 4px; font-size: 12.5px; }
th, td { text-align: left; vertical-align: top; padding: 4px 8px 4px 0; border-bottom: 1px solid #d4d2cc; overflow-wrap: anywhere; }
thead th { border-bottom: 1.5px solid #1b1b1b; font-weight: 600; overflow-wrap: normal; }
.word { overflow-wrap: normal; }
tbody th { font-weight: 500; }
.number { text-align: right; font-variant-numeric: tabular-nums; white-space: nowrap; }
.compared th:first-child { width: 17%; }
.chosen { background: #f1efe9; }
.bad { color: #a02000; font-weight: 600; }
dl { display: grid; grid-template-columns: minmax(120px, 200px) 1fr; gap: 3px 14px; margin: 10px 0; }
dt { color: #555; }
dd { margin: 0; overflow-wrap: anywhere; }
ol.steps li { margin: 0 0 10px; }
figure { margin: 12px 0; overflow-x: auto; break-inside: avoid; }
figure svg { max-width: 100%; height: auto; }
code { font: 11.5px ui-monospace, Consolas, monospace; }
@page { margin: 14mm; }
@media print {
  body { padding: 0; max-width: none; font-size: 10.5pt; }
  nav { display: none; }
  table, caption { font-size: 8.5pt; }
  tr, figure, .caution { break-inside: avoid; }
  h2, h3 { break-after: avoid; }
  thead { display: table-header-group; }
  a { color: inherit; text-decoration: none; }
}
`;
