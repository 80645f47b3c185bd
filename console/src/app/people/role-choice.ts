import { Component, computed, input, model } from '@angular/core';
import { FormsModule } from '@angular/forms';
import type { Role } from '../api/contract';
import { ROLE_NAMES } from '../api/roles';
import { ChoiceGroup } from '../ui/choice-group';
import { ROLES, ROLE_MEANINGS } from './role-words';

/** Roles with what each allows. A partner's developer sees nothing else, so that role stands alone. */
@Component({
  selector: 'tb-role-choice',
  imports: [ChoiceGroup, FormsModule],
  templateUrl: './role-choice.html',
  styleUrl: './role-choice.scss',
})
export class RoleChoice {
  readonly roles = model.required<readonly Role[]>();
  readonly offered = input<readonly Role[]>(ROLES);
  readonly error = input<string>();

  protected readonly names = ROLE_NAMES;
  protected readonly meanings = ROLE_MEANINGS;
  protected readonly standsAlone = computed(() => this.roles().includes('partner-developer'));

  protected isBarred(role: Role): boolean {
    return this.standsAlone() && role !== 'partner-developer';
  }

  protected choose(role: Role, chosen: boolean): void {
    if (role === 'partner-developer') this.roles.set(chosen ? [role] : []);
    else this.roles.set(ROLES.filter((known) => (known === role ? chosen : this.roles().includes(known))));
  }
}
