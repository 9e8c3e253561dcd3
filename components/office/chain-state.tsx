/** Whether the chain of a pour's entries holds, as checked on the server. */
export interface ChainCheck {
  intact: boolean;
  entries: number;
  headSeq: number;
  headHash: string | null;
  /** Where it does not hold. */
  problem: string | null;
}

/** Whether the chain holds, in one line. */
export function ChainState({ chain }: { chain: ChainCheck }) {
  return (
    <p className={chain.intact ? 'text-body text-pencil' : 'text-body font-semibold text-hold'}>
      {chain.intact
        ? `Chain checked: ${chain.entries} ${chain.entries === 1 ? 'entry' : 'entries'} of this pour, unbroken to no. ${chain.headSeq}`
        : `The chain is broken. ${chain.problem ?? ''}`}
      {chain.headHash && <span className="font-figure text-label"> {chain.headHash.slice(0, 16)}</span>}
    </p>
  );
}
