/** What a mail says, twice: as plain text and as HTML, from the same parts. */
export interface Letter {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface LetterParts {
  readonly subject: string;
  /** Over the large line, e.g. "Your corn snake arrives". */
  readonly lead: string;
  /** The thing to see at a glance, e.g. a date. */
  readonly large: string;
  readonly paragraphs: readonly string[];
  /** Facts as label and value. */
  readonly facts?: readonly (readonly [string, string])[];
  readonly button?: { readonly label: string; readonly url: string };
  /** Whether it speaks of a safe day, so that the planning note belongs under it. */
  readonly planning?: boolean;
}

export const planningNote = "A planning aid. Your carrier's terms, local law and your veterinarian come first.";

/** Text made safe for HTML content and double-quoted attributes (OWASP XSS Prevention, rules for both contexts). */
export const escapeHtml = (text: string): string =>
  text.replace(
    /[&<>"'`]/g,
    (sign) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;', '`': '&#96;' })[sign] ?? sign,
  );

/** Makes both forms of a mail; every value is escaped in the HTML. */
export function letter(parts: LetterParts): Letter {
  return { subject: parts.subject, text: textOf(parts), html: htmlOf(parts) };
}

function textOf(parts: LetterParts): string {
  const facts = (parts.facts ?? []).map(([label, value]) => `${label}: ${value}`).join('\n');
  const button = parts.button ? `${parts.button.label}: ${parts.button.url}` : '';
  const note = parts.planning ? planningNote : '';
  return [parts.lead, parts.large, ...parts.paragraphs, facts, button, note].filter((block) => block !== '').join('\n\n') + '\n';
}

function htmlOf(parts: LetterParts): string {
  const e = escapeHtml;
  const facts = (parts.facts ?? [])
    .map(([label, value]) => `<p style="margin:4px 0"><span style="color:#51606b">${e(label)}:</span> ${e(value)}</p>`)
    .join('');
  const button = parts.button
    ? `<p style="margin:24px 0"><a href="${e(parts.button.url)}" style="display:inline-block;background:#b5562d;color:#ffffff;text-decoration:none;font-weight:600;padding:14px 22px;border-radius:12px">${e(parts.button.label)}</a></p>`
    : '';
  const note = parts.planning
    ? `<p style="font-size:13px;color:#51606b;border-left:3px solid #5b4b8a;padding-left:12px">${e(planningNote)}</p>`
    : '';
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><meta name="color-scheme" content="light"><title>${e(parts.subject)}</title></head>
<body style="margin:0;background:#f6f1e7;color:#1d2b36;font:400 16px/1.5 'Work Sans',system-ui,sans-serif"><div style="max-width:560px;margin:0 auto;padding:28px 20px">
<p style="font-weight:600;color:#1f6f68;margin:0 0 20px">Dayberth</p><p style="margin:0;color:#51606b">${e(parts.lead)}</p>
<h1 style="font-size:30px;line-height:1.15;letter-spacing:-.02em;margin:4px 0 18px">${e(parts.large)}</h1>
${parts.paragraphs.map((text) => `<p>${e(text)}</p>`).join('\n')}
${facts}${button}${note}</div></body></html>`;
}
