import type { KeptMail } from './kept-mail';

const e = (text: string) =>
  text.replace(
    /[&<>"']/g,
    (sign) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[sign] ?? sign,
  );

export const stylesheet = `
:root{--ink:#1d2b36;--ink-2:#51606b;--juniper:#1f6f68;--oat:#f6f1e7;--paper:#fffdf8;--line:#ddd5c4}
@media (prefers-color-scheme:dark){:root{--ink:#eef0ec;--ink-2:#a9b4b8;--juniper:#6fc3b7;--oat:#12191e;--paper:#1a242b;--line:#33414a}}
*{box-sizing:border-box}body{margin:0;background:var(--oat);color:var(--ink);font:400 16px/1.5 system-ui,sans-serif}
main{max-width:860px;margin:0 auto;padding:24px 16px 64px}h1{font-size:26px;line-height:1.2;margin:0 0 6px}
p{margin:0 0 16px;color:var(--ink-2)}a{color:var(--juniper)}
ul{list-style:none;margin:0;padding:0}li{background:var(--paper);border:1px solid var(--line);border-radius:14px;margin:0 0 10px;padding:12px 16px;overflow-wrap:anywhere}
li a{font-weight:600;display:block;padding:4px 0}small{color:var(--ink-2);font-size:14px}
form{display:flex;flex-wrap:wrap;gap:10px;margin:0 0 20px;align-items:end}label{display:block;font-size:14px}
select,button{font:inherit;min-height:44px;border-radius:10px;border:1px solid var(--line);background:var(--paper);color:var(--ink);padding:0 12px;max-width:100%}
iframe{width:100%;height:860px;border:1px solid var(--line);border-radius:14px;background:#fff}
pre{background:var(--paper);border:1px solid var(--line);border-radius:14px;padding:14px;white-space:pre-wrap;overflow-wrap:anywhere;font-size:14px}
`;

const page = (title: string, body: string) =>
  `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${e(title)}</title><link rel="stylesheet" href="/style.css"></head><body><main>${body}</main></body></html>`;

/** What a mail does to the calendar, in words. */
function calendarWord({ calendar }: KeptMail): string {
  if (calendar === null) return '';
  return /^METHOD:CANCEL\r?$/m.test(calendar)
    ? ', takes an entry out of the calendar'
    : ', with a calendar invitation';
}

/** The list, newest first; `chosen` is the recipient it is narrowed to, empty for everybody. */
export function listPage(shown: readonly KeptMail[], all: readonly KeptMail[], chosen: string): string {
  const people = [...new Set(all.flatMap((mail) => mail.to))].sort();
  const options = people
    .map((one) => `<option${one === chosen ? ' selected' : ''}>${e(one)}</option>`)
    .join('');
  const items = shown
    .map(
      (mail) =>
        `<li><a href="/mail/${mail.id}">${e(mail.subject || '(no subject)')}</a><small>to ${e(mail.to.join(', '))}${calendarWord(mail)}</small></li>`,
    )
    .join('');
  return page(
    'Demo mailbox',
    `<h1>Demo mailbox</h1><p>Every mail the demo has sent ends here and goes no further.</p>
<form><div><label for="to">Sent to</label><select id="to" name="to"><option value="">everybody</option>${options}</select></div><button>Show</button></form>
${items ? `<ul>${items}</ul>` : '<p>No mail yet.</p>'}`,
  );
}

/** One mail: the HTML in a frame that can run nothing, the text, and the calendar part as it was sent. */
export function messagePage(mail: KeptMail): string {
  return page(
    mail.subject || 'Mail',
    `<p><a href="/">All mail</a></p><h1>${e(mail.subject)}</h1><p>from ${e(mail.from)}<br>to ${e(mail.to.join(', '))}</p>
${mail.html ? `<iframe sandbox="allow-popups" title="The mail as it looks" srcdoc="${e(mail.html)}"></iframe>` : ''}
<h2>As plain text</h2><pre tabindex="0">${e(mail.text)}</pre>
${mail.calendar ? `<h2>Calendar invitation</h2><pre tabindex="0">${e(mail.calendar)}</pre>` : ''}`,
  );
}
