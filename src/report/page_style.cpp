// Colours, type and measures. Text keeps a contrast of 4.5 or more on its ground; colour never
// works alone: every state has a word and a marker too, anions a hatch, curves a dash.
#include "report/page_style.hpp"

namespace ionledger {

const std::string_view page_style = R"css(
:root{
  --plumbline:#14315E;--sluice:#0A7872;--furnace:#8C2608;--straw:#826B00;--sloe:#96408F;
  --sluice-t:#D9EAE7;--sloe-t:#F0E2EE;--straw-t:#F1E8C6;--plumb-t:#DDE5F0;--furnace-t:#F3DFD9;
  --ink:#171B20;--graphite:#434B54;--lead:#5C656F;--rule:#C3C9CF;--hair:#E1E4E7;--tray:#F3F4F1;
  --body:15px;--small:13px;--title:34px;--verdict:19px;--h2:19px;--fact:22px;
  --gap:52px;--col:48px;--pad:64px;--row:34px;
}
*{box-sizing:border-box}
html{-webkit-text-size-adjust:100%;text-size-adjust:100%}
body{margin:0;background:var(--tray);color:var(--ink);
  font:400 var(--body)/1.5 "DejaVu Sans Condensed","Segoe UI","Helvetica Neue",Arial,"Noto Sans",sans-serif;
  font-variant-numeric:tabular-nums lining-nums;-webkit-print-color-adjust:exact;print-color-adjust:exact}
.sheet{max-width:1176px;margin:32px auto;background:#fff;border:1px solid var(--rule);padding:48px var(--pad) 56px}
.brand{display:flex;align-items:center;gap:10px;font-size:var(--small);color:var(--graphite);margin:0 0 14px}
h1{font-size:var(--title);line-height:1.15;letter-spacing:-.015em;margin:0;overflow-wrap:anywhere}
.sub{margin:8px 0 0;color:var(--graphite)}
.facts{display:flex;flex-wrap:wrap;justify-content:space-between;gap:10px 32px;margin:22px 0 0;border-top:2px solid var(--ink);padding-top:16px}
.facts dt{font-size:var(--small);color:var(--lead)}
.facts dd{margin:0;font-size:var(--fact);line-height:1.25;white-space:nowrap}
.facts small{font-size:var(--small);color:var(--graphite)}
section{margin-top:var(--gap);display:flow-root}
h2{font-size:var(--h2);line-height:1.25;margin:0}
h2 .no{font-weight:400;color:var(--lead);margin-right:.6em}
h3{font-size:var(--body);margin:26px 0 6px}
.find{margin:4px 0 18px;color:var(--graphite);max-width:80ch}
.note{font-size:var(--small);color:var(--graphite);margin:12px 0 0;max-width:100ch}
.two{display:grid;grid-template-columns:minmax(0,1fr) minmax(0,1fr);column-gap:var(--col);align-items:start}
.verdict{margin:12px 0 0;border-top:1px solid var(--rule)}
.verdict div{display:grid;grid-template-columns:130px 1fr;column-gap:24px;align-items:baseline;padding:13px 0;border-bottom:1px solid var(--rule)}
.verdict dt{color:var(--graphite)}
.verdict dd{margin:0;font-size:var(--verdict);line-height:1.4;overflow-wrap:anywhere}
.alarm{color:var(--furnace);font-weight:700}
.watch{font-weight:700}
.plot{display:block;overflow:visible;width:100%;font-size:var(--small)}
.plot .at{overflow:visible}
.plot text{fill:var(--ink)}
.plot .mid{text-anchor:middle}.plot .end{text-anchor:end}
.plot .quiet{fill:var(--lead)}.plot .strong,.plot .total,.plot .ion{font-weight:700}
.axis text{fill:var(--graphite)}
.grid{stroke:var(--hair);stroke-width:1}.zero{stroke:var(--graphite);stroke-width:1.5}
.balance{height:216px;margin-top:6px}
.segment{stroke:#fff;stroke-width:2.5}.cation{fill:var(--sluice-t)}.anion{fill:var(--sloe-t)}
.hatch{fill:url(#hatching);opacity:.3}.hatchline{stroke:var(--sloe);stroke-width:1.5}
.gap{fill:var(--furnace)}
.gapscale{height:44px;margin:10px 0 48px}
.accepted{fill:var(--straw-t)}.limit{stroke:var(--ink);stroke-width:1.6}
.good{fill:var(--plumbline)}.bad{fill:var(--furnace)}
.minerals{height:calc(var(--rows)*var(--row));margin:0 222px 54px 156px;width:calc(100% - 378px)}
.minerals .name{transform:translateX(-156px);font-weight:700}
.minerals .value{transform:translateX(112px)}.minerals .state{transform:translateX(124px);font-weight:700}
.whisker{stroke-width:2;fill:none}.ring{fill:#fff;stroke-width:1.8}
.m-forms .bar{fill:var(--furnace-t)}.m-forms .whisker,.m-forms .ring{stroke:var(--furnace)}.plot .m-forms .dot,.plot .m-forms .state,.m-forms .arrow{fill:var(--furnace)}
.m-slow .bar{fill:var(--hair)}.m-slow .whisker,.m-slow .ring{stroke:var(--graphite)}.plot .m-slow .dot,.plot .m-slow .state,.m-slow .arrow{fill:var(--graphite)}
.m-near .bar{fill:var(--straw-t)}.m-near .whisker,.m-near .ring{stroke:var(--straw)}.plot .m-near .dot,.plot .m-near .state,.m-near .arrow{fill:var(--straw)}
.m-under .bar{fill:var(--plumb-t)}.m-under .whisker,.m-under .ring{stroke:var(--plumbline)}.plot .m-under .dot,.plot .m-under .state,.m-under .arrow{fill:var(--plumbline)}
.steps{height:300px;margin:40px 140px 54px 44px;width:calc(100% - 184px)}
.steps.low{height:150px}
.steps .yname{transform:translateX(-44px);font-weight:700}
.curve{fill:none;stroke-width:2.2;vector-effect:non-scaling-stroke;stroke-linejoin:round}
.point{stroke:#fff;stroke-width:1}
.curve.c-ph{stroke:var(--sloe)}.point.c-ph,.plot .t-ph{fill:var(--sloe)}
.curve.c-1{stroke:var(--plumbline)}.point.c-1,.plot .t-1{fill:var(--plumbline)}
.curve.c-2{stroke:var(--furnace);stroke-dasharray:9 4}.point.c-2,.plot .t-2{fill:var(--furnace)}
.curve.c-3{stroke:var(--sluice);stroke-dasharray:2 4}.point.c-3,.plot .t-3{fill:var(--sluice)}
.curve.c-4{stroke:var(--straw);stroke-dasharray:10 3 2 3}.point.c-4,.plot .t-4{fill:var(--straw)}
.curve.c-5{stroke:var(--graphite);stroke-dasharray:5 5}.point.c-5,.plot .t-5{fill:var(--graphite)}
.scroll{overflow-x:auto}
table{border-collapse:collapse;width:100%;font-size:var(--small);margin:0}
caption{text-align:left;color:var(--graphite);padding-bottom:6px}
th,td{text-align:right;padding:4px 0 4px 12px;font-weight:400;vertical-align:top}
th:first-child,td:first-child{padding-left:0}
.left{text-align:left}
thead th{vertical-align:bottom;border-bottom:1.5px solid var(--ink);font-weight:700;line-height:1.25}
thead .u{display:block;font-weight:400;color:var(--lead)}
tbody tr{border-bottom:1px solid var(--hair)}
tbody:last-child tr:last-child{border-bottom:1.5px solid var(--ink)}
.num{white-space:nowrap}
.remarks{margin:0;font-size:var(--small);color:var(--graphite)}
.remarks dt{font-weight:700;color:var(--ink)}.remarks dd{margin:0 0 8px;max-width:100ch}
.state{border-top:1px solid var(--rule);margin-top:34px;padding-top:4px}
.state h3 .no{font-weight:400;color:var(--lead);margin-right:.6em}
.state h4{font-size:var(--small);margin:16px 0 4px}
.state .two .minerals{margin:0 216px 48px 120px;width:calc(100% - 336px)}
.cautions{border:1.5px solid var(--furnace);padding:20px 26px 10px}
.cautions ul{list-style:none;margin:12px 0 0;padding:0}
.cautions li{padding:0 0 12px;max-width:100ch;break-inside:avoid}
.cautions b{display:block}
.equation{border-top:1px solid var(--rule);border-bottom:1px solid var(--rule);padding:18px 0 16px}
.side{display:flex;flex-wrap:wrap;align-items:flex-start;row-gap:12px}
.side+.side{margin-top:18px}
.term{display:flex}
.op{width:1.3em;text-align:center;font-size:17px}
.pair{display:flex;flex-direction:column}
.what{font-size:17px;line-height:1.4;white-space:nowrap}
.amount{font-size:var(--small);color:var(--graphite);white-space:nowrap}
.gapterm .what,.gapterm .amount{color:var(--furnace);font-weight:700}
.sum{margin-left:auto;text-align:right;font-size:17px;white-space:nowrap;border-bottom:1px solid var(--ink);padding:0 0 2px 14px}
.closes .sum{border-bottom:3px double var(--ink)}
.record p,.record li{font-size:var(--small);color:var(--graphite);max-width:100ch}
.record ul{padding-left:1.2em;margin:0}
.digest{overflow-wrap:anywhere}
@media screen and (max-width:820px){
  :root{--title:26px;--verdict:17px;--h2:18px;--fact:18px;--gap:42px;--pad:18px;--row:50px}
  .sheet{margin:0;border:0;padding-top:22px}
  .facts{display:grid;grid-template-columns:1fr 1fr;gap:10px 16px}
  .facts dd{white-space:normal}
  .two{grid-template-columns:minmax(0,1fr);row-gap:28px}
  .verdict div{grid-template-columns:1fr;row-gap:2px;padding:11px 0}
  .minerals,.state .two .minerals{margin:0 118px 54px 0;width:calc(100% - 118px)}
  .minerals .name{transform:translateY(-17px)}
  .minerals .value{text-anchor:start;transform:translate(14px,-6px)}
  .minerals .state{transform:translate(14px,11px)}
  .steps{margin:40px 104px 54px 38px;width:calc(100% - 142px);height:260px}
  .steps .yname{transform:translateX(-38px)}
  th,td{padding-left:8px}
  .sum{margin-left:1.3em;flex-basis:calc(100% - 1.3em);text-align:left;padding-left:0}
  .cautions{padding:16px 16px 4px}
}
@page{margin:14mm 13mm}
@media print{
  :root{--body:9.2pt;--small:8.4pt;--title:19pt;--verdict:11pt;--h2:11.5pt;--fact:12.5pt;--gap:20pt;--col:22pt;--pad:0;--row:21pt}
  body{background:#fff;line-height:1.4}
  .sheet{margin:0;max-width:none;border:0;padding:0}
  .facts{margin-top:12pt;padding-top:9pt}
  .verdict div{grid-template-columns:80pt 1fr;padding:6pt 0}
  h2,h3,h4,.find,caption{break-after:avoid}
  svg,tr,.side,.find,.note,.verdict,.facts,figure,dd,.cautions{break-inside:avoid}
  thead{display:table-header-group}
  .find{margin-bottom:9pt}
  h3{margin-top:14pt}
  .balance{height:112pt}.gapscale{height:24pt;margin:5pt 0 30pt}
  .minerals{margin:0 158pt 34pt 100pt;width:calc(100% - 258pt)}
  .minerals .name{transform:translateX(-100pt)}.minerals .value{transform:translateX(76pt)}.minerals .state{transform:translateX(84pt)}
  .state .two{display:block}
  .state .two .minerals{margin:0 158pt 0 100pt;width:calc(100% - 258pt)}
  .steps{height:170pt;margin:0 96pt 0 32pt;padding-top:26pt;width:calc(100% - 128pt)}.steps.low{height:80pt}
  .steps .yname{transform:translateX(-32pt)}
  .scroll{overflow:visible}
  th,td{padding-top:1.6pt;padding-bottom:1.6pt}
  .state{margin-top:16pt}
  .equation{padding:9pt 0}.what,.op,.sum{font-size:10.5pt}.side{row-gap:6pt}.side+.side{margin-top:9pt}
  .cautions{padding:9pt 12pt 3pt}
}
)css";

}  // namespace ionledger
