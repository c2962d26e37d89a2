import { Inject, Injectable, Logger } from '@nestjs/common';
import type { Account, AcceptedInvitation, AcceptInvitation, OfferedInvitation } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { PasswordHasher } from '../auth/password-hasher.js';
import { problem } from '../common/problem.js';
import { DATABASE } from '../database/database.tokens.js';
import { hashOfToken } from '../mails/secret-links.js';
import { MembersService } from '../projects/members.service.js';
import { UsersService } from '../users/users.service.js';
import { stateOf } from './invitation-view.js';
import { InvitationsRepository, type OfferRow } from './invitations.repository.js';

/** Who holds the link of an invitation looks at it and accepts it. */
@Injectable()
export class AcceptingService {
  private readonly logger = new Logger('Invitations');

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: InvitationsRepository,
    private readonly members: MembersService,
    private readonly users: UsersService,
    private readonly hasher: PasswordHasher,
  ) {}

  /** @throws 410 for an invitation that was answered, taken back, has expired or never was */
  async look(token: string): Promise<OfferedInvitation> {
    const { invitation, projectName, inviterName, accountId } = await this.offer(token);
    const { role, email, expiresAt } = invitation;
    return {
      ...{ projectName, role, email, invitedBy: inviterName },
      expiresAt: expiresAt.toISOString(),
      hasAccount: accountId !== null,
    };
  }

  /**
   * Makes the person a member. The link shows that they read the mail of the address: enough to make the account of that
   * address, not to use one that is there. Whose it is must be signed in, by password.
   * @param signedInId the person of the session, if any
   * @throws 410 as `look`, 409 when the address has an account that is not signed in, 400 for a new account without name
   * or password
   */
  async accept(input: AcceptInvitation, signedInId: string | undefined): Promise<AcceptedInvitation> {
    const offer = await this.offer(input.token);
    if (offer.accountId !== null && offer.accountId !== signedInId) throw signInFirst(offer);
    const newcomer = offer.accountId === null ? await this.newcomer(offer, input) : undefined;
    const { id, projectId, role } = offer.invitation;
    const account = await this.database.transaction(async (tx) => {
      const row = await this.repository.hold(tx, id);
      if (!row || stateOf(row, new Date()) !== 'open') throw deadLink();
      const person = newcomer
        ? await this.makeAccount(tx, newcomer, offer)
        : await this.account(offer.accountId);
      await this.members.join(tx, projectId, person.id, role);
      await this.repository.update(tx, id, { acceptedAt: new Date(), acceptedById: person.id });
      return person;
    });
    this.logger.log({ invitation: id, project: projectId, by: account.id }, 'An invitation was accepted');
    return { projectId, account };
  }

  private async offer(token: string): Promise<OfferRow> {
    const offer = await this.repository.findByToken(hashOfToken(token));
    if (!offer || stateOf(offer.invitation, new Date()) !== 'open') throw deadLink();
    return offer;
  }

  private async newcomer({ invitation }: OfferRow, { name, password }: AcceptInvitation) {
    const missing = Object.entries({ name, password }).filter(([, value]) => value === undefined);
    if (name === undefined || password === undefined) {
      const errors = missing.map(([path]) => ({ path, message: 'This is missing' }));
      throw problem(400, 'invalid-request', 'A new account needs a name and a password', errors);
    }
    return { email: invitation.email, name, passwordHash: await this.hasher.hash(password) };
  }

  private async makeAccount(tx: Tx, person: NewPerson, offer: OfferRow): Promise<Account> {
    const account = await this.users.insert(tx, person);
    // Made meanwhile by somebody else: it has a password of its own.
    if (!account) throw signInFirst(offer);
    return account;
  }

  private async account(id: string | null): Promise<Account> {
    const account = id === null ? undefined : await this.users.findEnabled(id);
    if (!account) throw problem(403, 'account-disabled', 'This account is disabled; ask an administrator');
    return account;
  }
}

interface NewPerson {
  email: string;
  name: string;
  passwordHash: string;
}

const deadLink = () =>
  problem(
    410,
    'link-dead',
    'This invitation was answered already, was taken back or has expired; ask who invited you for a new one',
  );

const signInFirst = ({ invitation }: OfferRow) =>
  problem(409, 'sign-in-first', `${invitation.email} has an account; sign in with it to accept`);
