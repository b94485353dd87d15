import type { MendChange } from '../../schedule/mend.ts';
import { lengthText, oneSize, slopeText } from '../format.ts';
import { planWords } from '../words/plan-words.ts';
import { named } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { capital, nameOfId } from './names.ts';

/** What one change does, or several that change pipes alike, in the page's language. */
export function changeTitle(desk: Desk, group: readonly MendChange[]): string {
  const { building, words } = desk;
  const own = planWords[words.language];
  const first = group[0]!;
  const nameOf = (id: string | undefined): string => (id === undefined ? '' : nameOfId(building, words, id));
  const [at, then] = [nameOf(first.about[0]), nameOf(first.about[1])];
  switch (first.kind) {
    case 'size':
      return own.sized(
        group.length === 1 ? at : own.pipes(group.length),
        oneSize(words, first.size?.from),
        oneSize(words, first.size?.to),
      );
    case 'vent':
      return capital(`${own.newVent(ventText(desk, first))}, ${own.from(at)}`);
    case 'moved-vent':
      return `${own.movedVent(at, ventText(desk, first))}${then === '' ? '' : `, ${own.from(then)}`}`;
    case 'extended-vent':
      return own.longerVent(at, ventText(desk, first));
    case 'reading':
      return rowSentence(desk, first)[0] ?? '';
    case 'slope': {
      const { from = null, to = 0, lowered = null } = first.slope ?? {};
      const laid = own.relaid(
        first.about.map(nameOf).join(', '),
        from === null ? null : slopeText(words, from),
        slopeText(words, to),
      );
      const moves = lowered !== null && Math.abs(lowered) >= 0.0005;
      return moves ? `${laid}${words.colon}${own.lowered(lengthText(words, Math.abs(lowered)), lowered > 0)}` : laid;
    }
    case 'trap':
      return own.trap(at, lengthText(words, first.trap?.from ?? 0), lengthText(words, first.trap?.to ?? 0));
    case 'cleanout':
      return `${own.cleanout(oneSize(words, first.cleanout?.size), named(own.places, first.cleanout?.place ?? ''))}, ${at}`;
  }
}

/** What a vent makes of the row that it serves, and what a change of reading is. */
export function rowSentence({ words }: Desk, { reading }: MendChange): string[] {
  if (reading === undefined) return [];
  const { from, to, fixtures } = reading;
  return [`${planWords[words.language].row(fixtures, named(words.roles, from), named(words.roles, to))}.`];
}

function ventText({ building, words }: Desk, { vent }: MendChange): string {
  const own = planWords[words.language];
  if (vent === undefined) return '';
  const text = own.vent(named(words.roles, vent.role), oneSize(words, vent.size), lengthText(words, vent.length));
  switch (vent.ends) {
    case 'pipe':
      return `${text}, ${own.joins(nameOfId(building, words, vent.joins ?? ''))}`;
    case 'new-vent':
      return `${text}, ${own.toNewVent}`;
    case 'open-air':
      return `${text}, ${own.throughRoof}`;
    case 'as-before':
      return `${text}, ${own.toWhereItWent}`;
  }
}
