/** findings: the catalogue of codes and texts, and what a finding is. Words about findings stand here and nowhere else. */
export * from './finding';
export * from './catalogue';
