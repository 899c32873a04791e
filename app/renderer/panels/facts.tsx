import type { ReactNode } from 'react';
import { numbered } from '../numbered';

/** A name and its value; undefined: not there, and left out. */
export type Fact = readonly [ReactNode, ReactNode] | undefined;

/** Values with their names before them. */
export function Facts({ facts }: { readonly facts: readonly Fact[] }) {
  return (
    <dl className="facts">
      {numbered(facts).map(({ number, item: fact }) =>
        fact === undefined ? null : (
          <div key={number}>
            <dt>{fact[0]}</dt>
            <dd>{fact[1]}</dd>
          </div>
        ),
      )}
    </dl>
  );
}
