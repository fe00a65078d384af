/** The fake's look: the product's palette and type, light or dark as the reader's system says. */
export const style = `
@font-face{font-family:Text;src:url(/fonts/text.woff2);font-weight:200 800;font-display:swap}
@font-face{font-family:Figures;src:url(/fonts/figures.woff2);font-weight:200 800;font-display:swap}
:root{color-scheme:light dark;--paper:#f5f2ea;--sheet:#fffdf7;--ink:#22262e;--quiet:#62615d;--line:#d9d3c4;--dwell:#b8401f;--accent:#1f5b66}
@media (prefers-color-scheme:dark){:root{--paper:#12151b;--sheet:#191d25;--ink:#e6e1d6;--quiet:#a19d93;--line:#2d323c;--dwell:#e8643c;--accent:#7fc0c8}}
*{box-sizing:border-box}
body{margin:0;background:var(--paper);color:var(--ink);font:16px/1.5 Text,system-ui,sans-serif}
a{color:var(--accent);text-underline-offset:.15em}
:focus-visible{outline:2px solid var(--dwell);outline-offset:2px}
header{display:flex;flex-wrap:wrap;gap:4px 24px;align-items:baseline;padding:14px 28px;border-bottom:1px solid var(--line)}
header .mark{font-weight:760;font-size:21px;letter-spacing:-.01em;color:var(--ink);text-decoration:none}
header .what{color:var(--quiet)}
header .book{margin-left:auto}
.note{margin:0;padding:8px 28px;border-bottom:1px solid var(--line);color:var(--quiet);font-size:14.5px}
main{max-width:1080px;margin:0 auto;padding:22px 28px 60px}
h1{font-size:24px;line-height:1.25;margin:0 0 4px;font-weight:720;letter-spacing:-.01em;overflow-wrap:anywhere}
h2{font-size:16px;margin:30px 0 8px;font-weight:680}
.n{font-family:Figures,ui-monospace,monospace;font-variant-numeric:tabular-nums;font-size:.92em}
.quiet{color:var(--quiet)}
.bar{display:flex;flex-wrap:wrap;gap:10px 18px;align-items:end;justify-content:space-between;margin-bottom:16px}
.bar p{margin:0;color:var(--quiet)}
form{display:flex;gap:8px;align-items:end;flex-wrap:wrap}
label{display:block;font-size:14px;color:var(--quiet)}
input{font:inherit;color:inherit;background:var(--sheet);border:1px solid var(--quiet);border-radius:3px;padding:6px 10px;min-width:0;width:240px;max-width:100%}
button{font:600 15px Text,system-ui,sans-serif;background:var(--ink);color:var(--sheet);border:0;padding:9px 16px;border-radius:3px}
.sheet{background:var(--sheet);border:1px solid var(--line);border-radius:3px}
ol.mails{list-style:none;margin:0;padding:0}
ol.mails li{display:grid;grid-template-columns:190px 1fr auto;gap:2px 18px;padding:10px 16px;border-bottom:1px solid var(--line);position:relative}
ol.mails li:last-child{border-bottom:0}
ol.mails li:hover{background:color-mix(in srgb,var(--accent) 7%,var(--sheet))}
ol.mails a{font-weight:620;color:var(--ink);overflow-wrap:anywhere}
ol.mails a::after{content:"";position:absolute;inset:0}
ol.mails .to{color:var(--quiet);font-size:14.5px;overflow-wrap:anywhere}
.tags{display:flex;gap:6px;align-items:start;flex-wrap:wrap}
.tag{padding:1px 8px 2px;font-size:13px;border:1.5px solid var(--ink);border-radius:2px;white-space:nowrap}
.tag[data-method=CANCEL]{border-style:dashed}
.tag.again{border-color:var(--quiet);color:var(--quiet);border-style:dotted}
.none{padding:44px 20px;text-align:center}
.none p{margin:4px auto;max-width:44ch}
.turn{display:flex;justify-content:space-between;gap:18px;margin-top:16px}
.facts{margin:14px 0 0;padding:12px 16px;display:grid;grid-template-columns:110px 1fr;gap:4px 14px}
.facts dt{color:var(--quiet);font-size:14.5px}.facts dd{margin:0;overflow-wrap:anywhere}
iframe{display:block;width:100%;height:min(72vh,640px);border:1px solid var(--line);border-radius:3px;background:#fff;resize:vertical;overflow:auto}
pre{margin:0;padding:14px 16px;white-space:pre-wrap;overflow-wrap:anywhere;font:14.5px/1.5 Figures,ui-monospace,monospace}
ul.files{margin:0;padding:6px 16px;list-style:none}ul.files li{padding:6px 0;overflow-wrap:anywhere}
summary{cursor:pointer;padding:10px 16px;font-weight:620}
@media (max-width:700px){header,.note{padding-left:16px;padding-right:16px}main{padding:16px 16px 48px}header .book{margin-left:0}
ol.mails li{grid-template-columns:1fr;padding:12px 14px}.facts{grid-template-columns:1fr;gap:0}.facts dd{margin-bottom:8px}form{flex-wrap:nowrap}form,form>div,input{width:100%}}
`;
