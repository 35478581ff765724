/** The mark: a disc crossed by the path of a small planet. */
export const Mark = () => (
  <svg width="26" height="26" viewBox="0 0 26 26" aria-hidden="true">
    <circle cx="13" cy="13" r="11" fill="none" stroke="currentColor" strokeWidth="1.4" />
    <line x1="1" y1="17" x2="25" y2="17" stroke="var(--mark)" strokeWidth="1.6" />
    <circle cx="17.5" cy="17" r="2.6" fill="var(--mark)" />
  </svg>
);
