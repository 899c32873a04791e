import type { ReactNode } from 'react';

/** The program's mark: a curve that falls into its well and parts for good. */
export function Mark() {
  return (
    <svg className="mark" viewBox="0 0 26 20" width="26" height="20" aria-hidden="true">
      <path
        d="M3 1.5C4.2 12.5 6 18 8.4 18c3 0 4.2-10.5 15.6-10.8"
        fill="none"
        stroke="currentColor"
        strokeWidth="2"
        strokeLinecap="round"
      />
      <circle cx="8.4" cy="18" r="2" fill="var(--accent)" />
    </svg>
  );
}

/** Beside a name that says the same. */
function Icon({ children }: { readonly children: ReactNode }) {
  return (
    <svg viewBox="0 0 16 16" width="15" height="15" aria-hidden="true">
      {children}
    </svg>
  );
}

export function LightIcon() {
  return (
    <Icon>
      <circle cx="8" cy="8" r="3" fill="none" stroke="currentColor" strokeWidth="1.5" />
      <path
        d="M8 1v2M8 13v2M1 8h2M13 8h2M3 3l1.4 1.4M11.6 11.6L13 13M3 13l1.4-1.4M11.6 4.4L13 3"
        stroke="currentColor"
        strokeWidth="1.5"
        strokeLinecap="round"
      />
    </Icon>
  );
}

export function DarkIcon() {
  return (
    <Icon>
      <path
        d="M13 10.2A5.8 5.8 0 0 1 5.8 3a5.8 5.8 0 1 0 7.2 7.2z"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.5"
        strokeLinejoin="round"
      />
    </Icon>
  );
}

export function SystemIcon() {
  return (
    <Icon>
      <circle cx="8" cy="8" r="6" fill="none" stroke="currentColor" strokeWidth="1.5" />
      <path d="M8 2a6 6 0 0 1 0 12z" fill="currentColor" />
    </Icon>
  );
}
