/** One mail before it is laid out: sentences, and at most one thing to do. */
export type MailText = {
  subject: string;
  /** The headline, on the strip of tape. */
  heading: string;
  paragraphs: string[];
  action?: { label: string; url: string };
  /** Smaller, at the end: what to do when the mail is a surprise. */
  aside: string;
};

/** Colours of the light theme (src/ui/tokens.css): mail programs know no custom properties. */
const colours = {
  paper: '#f3f0e8',
  sheet: '#fbfaf5',
  ink: '#1b211d',
  secondInk: '#59625b',
  line: '#dad5c6',
  case: '#0d5b4b',
  tape: '#fffef6',
};
const sans = "'IBM Plex Sans', 'Helvetica Neue', Arial, sans-serif";

const signature = 'Flightcase: multitracks, packed right before they travel.';

function escapeHtml(text: string): string {
  const entities: Record<string, string> = {
    '&': '&amp;',
    '<': '&lt;',
    '>': '&gt;',
    '"': '&quot;',
    "'": '&#39;',
  };
  return text.replace(/[&<>"']/g, (character) => entities[character] ?? character);
}

/** The mail as plain text, for whoever reads it that way. */
export function layOutText({ heading, paragraphs, action, aside }: MailText): string {
  return [
    heading,
    ...paragraphs,
    ...(action ? [`${action.label}:\n${action.url}`] : []),
    aside,
    `-- \n${signature}`,
  ].join('\n\n');
}

/**
 * The mail as HTML: tables and inline styles only, no images, nothing loaded from anywhere, so
 * that every mail program shows it and nobody learns when it was opened.
 */
export function layOutHtml({ subject, heading, paragraphs, action, aside }: MailText): string {
  const paragraph = (text: string) =>
    `<p style="margin:0 0 16px;font-size:16px;line-height:26px;color:${colours.ink}">${escapeHtml(text)}</p>`;
  const button = action
    ? `<p style="margin:24px 0"><a href="${escapeHtml(action.url)}" style="display:inline-block;padding:12px 20px;border-radius:6px;background:${colours.case};color:#ffffff;font-size:16px;font-weight:600;text-decoration:none">${escapeHtml(action.label)}</a></p>
<p style="margin:0 0 16px;font-size:14px;line-height:22px;color:${colours.secondInk}">If the button does nothing, copy this into your browser:<br><span style="word-break:break-all">${escapeHtml(action.url)}</span></p>`
    : '';
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escapeHtml(subject)}</title></head>
<body style="margin:0;padding:0;background:${colours.paper};font-family:${sans}">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="background:${colours.paper}"><tr><td align="center" style="padding:32px 16px">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="max-width:560px;background:${colours.sheet};border:1px solid ${colours.line};border-radius:8px"><tr><td style="padding:32px">
<h1 style="margin:0 0 24px;display:inline-block;padding:8px 14px;background:${colours.tape};border:1px solid ${colours.line};border-radius:3px;font-size:20px;line-height:28px;font-weight:600;color:${colours.ink}">${escapeHtml(heading)}</h1>
${paragraphs.map(paragraph).join('\n')}
${button}
<p style="margin:24px 0 0;padding-top:16px;border-top:1px solid ${colours.line};font-size:14px;line-height:22px;color:${colours.secondInk}">${escapeHtml(aside)}</p>
</td></tr></table>
<p style="margin:16px 0 0;font-size:12px;line-height:18px;color:${colours.secondInk}">${escapeHtml(signature)}</p>
</td></tr></table></body></html>`;
}
