const ADDRESS = /https?:\/\/[^\s<>"“”]+/g;

interface Piece {
  text: string;
  /** Path within this application; absent for plain text and for addresses elsewhere. */
  to?: string;
}

/** Cuts a mail's text at its addresses; only those of this very installation can be followed. */
export const piecesOf = (body: string, origin: string): Piece[] => {
  const pieces: Piece[] = [];
  let end = 0;
  for (const match of body.matchAll(ADDRESS)) {
    const [text] = match;
    if (!URL.canParse(text)) continue;
    const url = new URL(text);
    if (url.origin !== origin) continue;
    pieces.push({ text: body.slice(end, match.index) }, { text, to: url.pathname + url.search });
    end = match.index + text.length;
  }
  pieces.push({ text: body.slice(end) });
  return pieces.filter(({ text }) => text !== "");
};

/** A mail's text as text: nothing in it is taken for markup. */
export const BodyText = ({ body }: { body: string }) => {
  let at = 0;
  return (
    <div className="whitespace-pre-wrap wrap-anywhere">
      {piecesOf(body, window.location.origin).map(({ text, to }) => {
        const key = at;
        at += text.length;
        // A whole page load: the link may lead into another person's session.
        return to === undefined ? (
          <span key={key}>{text}</span>
        ) : (
          <a key={key} href={to} className="underline underline-offset-4">
            {text}
          </a>
        );
      })}
    </div>
  );
};
