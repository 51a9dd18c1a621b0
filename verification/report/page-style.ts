import { declarations } from "./charts/palette.ts";

const COLOURS = `
:root{color-scheme:light dark;${declarations("light")}}
@media (prefers-color-scheme:dark){:root{${declarations("dark")}}}
@media print{:root{color-scheme:light;${declarations("light")}}}
`;

const TEXT = `
*{box-sizing:border-box}
html{-webkit-text-size-adjust:100%;text-size-adjust:100%}
body{margin:0;background:var(--paper);color:var(--ink);font:15px/1.5 system-ui,sans-serif;overflow-wrap:anywhere}
main,header,footer{max-width:68rem;margin:0 auto;padding:0 1rem}
header{padding-top:1rem}
footer{padding-bottom:3rem}
p,li,dd,figcaption{max-width:46rem}
h1{font-size:1.55rem;line-height:1.25;margin:.4rem 0 .2rem;font-weight:650;text-wrap:balance}
h2{font-size:1.15rem;line-height:1.3;margin:0 0 .7rem;font-weight:650}
h3{font-size:1rem;line-height:1.35;margin:0 0 .4rem;font-weight:650}
p,ul,dl{margin:.4rem 0 .8rem}
ul{padding-left:1.2rem}
a{color:var(--accent);text-underline-offset:.15em}
a:focus-visible,summary:focus-visible,.box:focus-visible,button:focus-visible{outline:2px solid var(--accent);outline-offset:2px}
code{font:.9em/1.4 ui-monospace,"DejaVu Sans Mono",monospace}
small{display:block;font-size:.86em;color:var(--soft);font-weight:400}
.seed{margin:0;font-variant-numeric:tabular-nums;color:var(--soft)}
.seed b{color:var(--ink)}
.lead{color:var(--soft);margin-top:0}
.on{font-weight:400;color:var(--soft)}
.source{color:var(--soft);font-size:.9em}
section{border-top:2px solid var(--ink);margin-top:2rem;padding-top:.6rem;counter-increment:section}
section>h2::before{content:counter(section) "  ";color:var(--soft);font-weight:400}
body{counter-reset:section}
article{border-top:1px solid var(--rule);padding-top:.8rem;margin-top:1.2rem}
nav ol{columns:14rem;padding-left:1.4rem;margin:.6rem 0 0}
`;

const PARTS = `
.cautions{border:1.5px solid var(--ink);padding:.6rem .9rem .3rem;margin:1.2rem 0 0}
.cautions h2{font-size:1rem;margin:0 0 .2rem}
.cautions ul{margin:.2rem 0 .5rem}
.shape{width:1em;height:1em;flex:none;vertical-align:-.13em;fill:none;stroke:currentColor;stroke-width:1.6}
.shape .solid{fill:currentColor;stroke:none}
.shape .knock{stroke:var(--knock,var(--paper));stroke-width:2}
.headline{display:flex;gap:.55rem;align-items:baseline;font-size:1.3rem;line-height:1.35;font-weight:650;max-width:none}
.verdict{white-space:nowrap;font-weight:600;padding:.05rem .4rem;border:1px solid transparent}
.verdict.violated{background:var(--ink);color:var(--paper);--knock:var(--ink)}
.verdict.holds{border-color:var(--rule)}
.verdict.not_exercised{border:1px dashed var(--soft)}
.violations li,.untested li{margin-bottom:.4rem}
.box{overflow-x:auto;margin:.5rem 0 .9rem;scrollbar-width:thin;position:relative}
.caption+.box{margin-top:.15rem}
table{overflow-wrap:break-word;border-collapse:collapse;font-size:.88rem;line-height:1.35;font-variant-numeric:tabular-nums}
caption{position:absolute;width:1px;height:1px;overflow:hidden;clip-path:inset(50%);white-space:nowrap}
.caption{color:var(--soft);font-size:.88rem;margin:.9rem 0 0;max-width:none}
th,td{padding:.28rem .65rem;border-bottom:1px solid var(--rule);text-align:right;vertical-align:top}
thead th{border-bottom:1.5px solid var(--ink);vertical-align:bottom;font-weight:600}
td{white-space:nowrap}
th[scope=row],.words{text-align:left}
thead th:first-child{text-align:left}
.words,ul.plain li{white-space:normal}
tbody th{font-weight:500}
table.requirements th[scope=row]{min-width:11rem;width:26rem}
table.requirements thead th{max-width:7rem}
table.requirements td.words{white-space:nowrap}
table.inputs td,table.numbers td,table.agreement td:nth-child(2),table.scenarios td:nth-child(4),table.scenarios td:nth-child(5),
table.figures td:nth-child(3),table.inputs th:nth-child(3),table.numbers th,table.agreement th:nth-child(2),
table.scenarios th:nth-child(4),table.scenarios th:nth-child(5),table.figures th:nth-child(3),table.files td:nth-child(3),
table.files th:nth-child(3){text-align:left}
table.inputs td:nth-child(2){text-align:right}
table.agreement th[scope=row]{min-width:9rem}
ul.plain{list-style:none;padding:0;margin:0}
.hash{font-size:.82em}
figure{margin:.9rem 0 1.2rem}
figcaption{color:var(--soft);font-size:.93em}
details{margin-top:.3rem}
summary{cursor:pointer;color:var(--accent);width:max-content;max-width:100%}
.picture{display:block;width:100%;height:auto}
.picture text{font-variant-numeric:tabular-nums}
.pair{display:grid;grid-template-columns:minmax(0,1fr);gap:0 2rem}
dl{display:grid;grid-template-columns:minmax(6rem,max-content) minmax(0,1fr);gap:.3rem 1rem}
dt{font-weight:600}
dd{margin:0}
dl.facts dt{font-weight:400;color:var(--soft);max-width:14rem}
.zoom{display:flex;flex-wrap:wrap;gap:.4rem 1rem;align-items:baseline;font-size:.9rem;color:var(--soft);min-height:1.6rem}
.zoom output{color:var(--ink);font-variant-numeric:tabular-nums}
.zoom button{font:inherit;color:var(--ink);background:var(--panel);border:1px solid var(--rule);padding:.1rem .6rem;cursor:pointer}
@media (min-width:60rem){.pair{grid-template-columns:minmax(0,1fr) minmax(0,1fr)}}
@media (max-width:30rem){dl,dl.facts{grid-template-columns:minmax(0,1fr);gap:0}dd{margin-bottom:.5rem}}
`;

const PRINT = `
@page{size:A4;margin:14mm 13mm 16mm;@bottom-right{content:counter(page) " of " counter(pages);font:8pt system-ui,sans-serif}}
@media print{
body{font-size:9.5pt}
main,header,footer{max-width:none;padding:0}
nav,details,.zoom{display:none}
a{color:inherit;text-decoration:none}
.box{overflow:visible}
table{font-size:8pt;width:100%}
th,td{padding:.15rem .3rem}
table.requirements{font-size:7.2pt}
table.requirements th[scope=row]{min-width:0;width:36%}
table.requirements .verdict{padding:0 .15rem}
#details article{break-inside:avoid}
table.requirements th,table.requirements td{padding:.15rem .2rem}
td,caption{white-space:normal}
.hash{font-size:.7em;word-break:break-all}
figure,tr,.cautions,.headline{break-inside:avoid}
h2,h3,.caption{break-after:avoid}
.caption{font-size:8pt}
thead{display:table-header-group}
.picture{min-width:0!important;max-width:165mm!important}
.pair{grid-template-columns:minmax(0,1fr) minmax(0,1fr)}
.verdict.violated{print-color-adjust:exact;-webkit-print-color-adjust:exact}
}
`;

/** The whole style of a page: plain text first, colours for both schemes, print. */
export const PAGE_STYLE = `${COLOURS}${TEXT}${PARTS}${PRINT}`;
