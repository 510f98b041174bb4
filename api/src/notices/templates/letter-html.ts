import { planningNote, type LetterParts } from './letter';

/** Text made safe for HTML content and double-quoted attributes (OWASP XSS Prevention, rules for both contexts). */
export const escapeHtml = (text: string): string =>
  text.replace(
    /[&<>"'`]/g,
    (sign) =>
      ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;', '`': '&#96;' })[sign] ?? sign,
  );

const font = "'Work Sans',system-ui,-apple-system,'Segoe UI',Roboto,sans-serif";

/** Mail programs that know dark schemes take these; the others keep the inline colours. */
const darkStyle = `:root{color-scheme:light dark;supported-color-schemes:light dark}
@media (prefers-color-scheme:dark){
.page{background:#12191e!important;color:#eef0ec!important}.card{background:#1a242b!important;border-color:#33414a!important}
.soft{color:#a9b4b8!important}.mark,.link{color:#6fc3b7!important}.ink{color:#eef0ec!important}.rule{border-color:#33414a!important}
.button{background:#e0875d!important;color:#1b1209!important}.note{border-color:#a99bd8!important}}`;

/** The HTML form: one column, colours of the site, readable without its style sheet; every value escaped. */
export function htmlOf(parts: LetterParts): string {
  const e = escapeHtml;
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark"><title>${e(parts.subject)}</title><style>${darkStyle}</style></head>
<body class="page" style="margin:0;padding:0;background:#f6f1e7;color:#1d2b36;font:400 16px/1.55 ${font}">
<div style="max-width:560px;margin:0 auto;padding:24px 16px 32px">
<p class="mark" style="margin:0 4px 14px;color:#1f6f68;font-weight:600;font-size:17px">Dayberth</p>
<div class="card" style="background:#fffdf8;border:1px solid #ddd5c4;border-radius:16px;padding:26px 22px">
<p class="soft" style="margin:0 0 4px;color:#51606b">${e(parts.lead)}</p>
<h1 class="ink" style="margin:0 0 18px;color:#1d2b36;font-size:28px;font-weight:600;line-height:1.18;letter-spacing:-.02em">${largeOf(parts)}</h1>
${parts.paragraphs.map((text) => `<p style="margin:0 0 14px">${lines(text)}</p>`).join('\n')}
${stepsOf(parts)}${factsOf(parts)}${listOf(parts)}${buttonOf(parts)}${softOf(parts.calendarNote)}${noteOf(parts)}</div>
<p class="soft" style="margin:16px 4px 0;color:#51606b;font-size:13px;line-height:1.5">${e(parts.because)}</p>
</div></body></html>`;
}

/** A time of day stays on one line with its half of the day. */
const inline = (text: string): string => escapeHtml(text).replace(/(\d) (AM|PM)\b/gi, '$1&nbsp;$2');

const lines = (text: string): string => inline(text).replaceAll('\n', '<br>');

const largeOf = ({ large }: LetterParts): string =>
  large.flatMap((line) => (line === undefined ? [] : [inline(line)])).join('<br>');

/** A step that begins with a time of day has it in bold. */
const timedStep = (step: string): string =>
  inline(step).replace(/^\d{1,2}:\d\d(?:&nbsp;[AP]M)?/, '<strong>$&</strong>');

function stepsOf({ steps = [] }: LetterParts): string {
  if (steps.length === 0) return '';
  const items = steps.map((step) => `<li style="margin:0 0 8px;padding-left:4px">${timedStep(step)}</li>`);
  return `<ol style="margin:0 0 16px;padding-left:22px">${items.join('')}</ol>\n`;
}

/** A table of two columns: the one layout that every mail program draws alike. */
function factsOf({ facts = [] }: LetterParts): string {
  if (facts.length === 0) return '';
  const row = ([label, value]: readonly [string, string]) =>
    `<tr><th class="soft rule" scope="row" style="text-align:left;vertical-align:top;width:1%;font-weight:400;color:#51606b;padding:8px 18px 8px 0;border-top:1px solid #e7dfce;white-space:nowrap">${escapeHtml(label)}</th>` +
    `<td class="rule" style="vertical-align:top;padding:8px 0;border-top:1px solid #e7dfce;overflow-wrap:anywhere">${lines(value)}</td></tr>`;
  return `<table style="width:100%;border-collapse:collapse;margin:0 0 18px;font-size:15px">${facts.map(row).join('')}</table>\n`;
}

function listOf({ list }: LetterParts): string {
  if (!list) return '';
  const items = list.items.map((item) => `<li style="margin:0 0 6px;padding-left:4px">${inline(item)}</li>`);
  return (
    `<p class="soft" style="margin:0 0 6px;color:#51606b;font-size:15px">${escapeHtml(list.label)}</p>\n` +
    `<ul style="margin:0 0 16px;padding-left:22px;font-size:15px">${items.join('')}</ul>\n`
  );
}

/** The button, and its address in words for those whose program shows no links. */
function buttonOf({ button }: LetterParts): string {
  if (!button) return '';
  const url = escapeHtml(button.url);
  return (
    `<p style="margin:22px 0 12px"><a class="button" href="${url}" style="display:inline-block;background:#b5562d;color:#ffffff;text-decoration:none;font-weight:600;padding:13px 22px;border-radius:12px">${escapeHtml(button.label)}</a></p>\n` +
    `<p class="soft" style="margin:0 0 16px;color:#51606b;font-size:13px;overflow-wrap:anywhere">or open <a class="link" href="${url}" style="color:#1f6f68">${url}</a></p>\n`
  );
}

const softOf = (text: string | undefined): string =>
  text === undefined ? '' : `<p class="soft" style="margin:0 0 14px;color:#51606b">${escapeHtml(text)}</p>\n`;

const noteOf = ({ planning }: LetterParts): string =>
  planning
    ? `<p class="soft note" style="margin:0;color:#51606b;font-size:13px;border-left:3px solid #5b4b8a;padding-left:12px">${escapeHtml(planningNote)}</p>\n`
    : '';
