import type { MemberItem } from '#contract/admin.ts';
import { sayList } from '../../lib/say-number.ts';

/** `Member`, `Registrar`, `Moderator of all makers`, `Moderator of Skerry Foundry and Hesper Lathe Company`. */
export function sayRole({ role, moderates }: Pick<MemberItem, 'role' | 'moderates'>): string {
  switch (role) {
    case 'member':
      return 'Member';
    case 'registrar':
      return 'Registrar';
    case 'moderator':
      if (moderates === null) return 'Moderator of all makers';
      return moderates.length === 0 ? 'Moderator of no maker yet' : `Moderator of ${sayList(moderates.map(({ name }) => name), 'and')}`;
  }
}
