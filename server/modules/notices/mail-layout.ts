export interface MailContent {
  readonly subject: string;
  /** A sentence at the top. */
  readonly heading: string;
  readonly paragraphs: readonly string[];
  readonly action: { readonly label: string; readonly link: string } | null;
  /** Why the reader gets this mail. */
  readonly reason: string;
}

export interface RenderedMail {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

const ENTITIES: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text made safe inside HTML, attributes included. */
export const escapeHtml = (value: string) =>
  value.replace(/[&<>"']/g, (character) => ENTITIES[character] ?? character);

/** A subject is one line. */
const oneLine = (value: string) => value.replace(/\s+/g, ' ').trim();

/**
 * One plain table layout for every mail: readable as text, without pictures or outside resources, and with colours
 * that hold when a reader's dark mode inverts them.
 */
export function renderMail(content: MailContent): RenderedMail {
  const text = [
    content.heading,
    ...content.paragraphs,
    ...(content.action ? [`${content.action.label}:\n${content.action.link}`] : []),
    `--\n${content.reason}`,
  ].join('\n\n');
  const paragraph = (value: string) =>
    `<p style="margin:0 0 14px;font:16px/1.5 'Atkinson Hyperlegible Next',Verdana,sans-serif;color:#1a1d1b">${escapeHtml(value)}</p>`;
  const action = content.action
    ? `<p style="margin:22px 0"><a href="${escapeHtml(content.action.link)}" style="display:inline-block;padding:13px 22px;background:#0e5a4a;color:#ffffff;font:600 16px Verdana,sans-serif;text-decoration:none;border-radius:8px">${escapeHtml(content.action.label)}</a></p>` +
      `<p style="margin:0 0 14px;font:13px/1.5 Verdana,sans-serif;color:#50606a">If the button does nothing, open this address: ${escapeHtml(content.action.link)}</p>`
    : '';
  const html =
    `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><meta name="color-scheme" content="light dark"><title>${escapeHtml(content.subject)}</title></head>` +
    `<body style="margin:0;background:#f6f4ee"><table role="presentation" width="100%" cellpadding="0" cellspacing="0" bgcolor="#f6f4ee"><tr><td align="center" style="padding:28px 14px">` +
    `<table role="presentation" width="100%" cellpadding="0" cellspacing="0" bgcolor="#ffffff" style="max-width:560px;border-top:4px solid #0e5a4a"><tr><td style="padding:26px 26px 14px">` +
    `<h1 style="margin:0 0 16px;font:700 24px/1.2 Archivo,Verdana,sans-serif;color:#1a1d1b">${escapeHtml(content.heading)}</h1>` +
    content.paragraphs.map(paragraph).join('') +
    action +
    `</td></tr><tr><td style="padding:14px 26px 24px;border-top:1px solid #dde3e0;font:13px/1.5 Verdana,sans-serif;color:#50606a">${escapeHtml(content.reason)}</td></tr></table></td></tr></table></body></html>`;
  return { subject: oneLine(content.subject), text, html };
}
