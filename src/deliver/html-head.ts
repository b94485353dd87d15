export interface HtmlHead {
  /** Content Security Policy. */
  readonly policy: string;
  /** The title element as markup: names from outside come escaped. */
  readonly title: string;
  readonly style: string;
  /** The page is made for both; a document to print has its own paper. */
  readonly darkAndLight: boolean;
}

/** How every HTML file of ours begins, up to its body: what it may do is said before anything else. */
export const htmlHead = ({ policy, title, style, darkAndLight }: HtmlHead): string => `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${policy}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="referrer" content="no-referrer">
${darkAndLight ? '<meta name="color-scheme" content="light dark">\n' : ''}${title}
<style>${style}</style>
</head>`;
