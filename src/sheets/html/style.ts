/**
 * The look of a sheet: ink on paper, 18 px, dark where the reader's system asks for it, ink on white in print. Large
 * print and more contrast are check boxes that work without a script.
 */
export const style = `
:root{--paper:#fff;--ink:#1B1F3B;--soft:#565A78;--rule:#1B1F3B;--usable:#0B6660;--with-cautions:#8A5000;--with-help:#6A3FA0;--do-not-use:#1B1F3B;--not-known:#5E6073;--focus:#0A58CA;color-scheme:light dark}
@media (prefers-color-scheme:dark){:root{--paper:#12142A;--ink:#F4F0E6;--soft:#B9BBD0;--rule:#B9BBD0;--usable:#6FD6CB;--with-cautions:#F2B957;--with-help:#CDB0F7;--do-not-use:#F4F0E6;--not-known:#A9ABC2;--focus:#8AB8FF}}
@media (prefers-contrast:more){:root{--soft:var(--ink)}}
html{font:18px/1.5 system-ui,sans-serif;font-variant-numeric:tabular-nums;background:var(--paper);color:var(--ink)}
html:has(#large:checked){font-size:26px}
html:has(#contrast:checked){--paper:#000;--ink:#fff;--soft:#fff;--rule:#fff;--usable:#fff;--with-cautions:#fff;--with-help:#fff;--do-not-use:#fff;--not-known:#fff;--focus:#fff}
body{margin:0 auto;max-width:40rem;padding:0 16px 48px;overflow-wrap:anywhere}
body.wide{max-width:72rem}
h1,h2,h3,h4{line-height:1.25;margin:2rem 0 .5rem}
h1{font-size:1.45rem;margin-top:1rem}h2{font-size:1.22rem}h3{font-size:1.1rem}h4{font-size:1rem}
p,ul{margin:.5rem 0}ul{padding-left:1.25rem}li{margin:.35rem 0}
.verdict{display:flex;gap:12px;align-items:flex-start;font-weight:600;font-size:1.22rem}
.mark{flex:none}.tape{display:block;margin:0 0 8px}.tape-ground{fill:#F2C230}.tape-ticks{stroke:#1B1F3B;fill:none}
.verdict-usable .mark{color:var(--usable)}.verdict-with-cautions .mark{color:var(--with-cautions)}.verdict-with-help .mark{color:var(--with-help)}.verdict-do-not-use .mark{color:var(--do-not-use)}.verdict-not-known .mark{color:var(--not-known)}
.look{border:1px solid var(--rule);border-radius:10px;margin:1rem 0;padding:8px 16px}
.look label{display:inline-flex;gap:8px;align-items:center;min-height:44px;margin-right:24px}.look input{width:24px;height:24px}
.table{overflow-x:auto}table{border-collapse:collapse;width:100%}caption{text-align:left;color:var(--soft);padding:4px 0}
th,td{border-bottom:1px solid var(--rule);padding:6px 12px 6px 0;text-align:left;vertical-align:top;min-width:5rem;overflow-wrap:break-word}
:focus-visible{outline:3px solid var(--focus);outline-offset:2px}
@media print{:root,html:has(#contrast:checked){--paper:#fff;--ink:#000;--soft:#000;--rule:#000;--usable:#000;--with-cautions:#000;--with-help:#000;--do-not-use:#000;--not-known:#000}html{font-size:14pt}html:has(#large:checked){font-size:20pt}body,body.wide{max-width:none;padding:0}.look{display:none}.tape-ground{fill:#fff}.tape{border-bottom:1px solid #000}h1,h2,h3,h4{break-after:avoid}li,tr{break-inside:avoid}.part{break-inside:avoid}.table{overflow:visible}td:empty{min-width:6rem}}
`.trim()
