import { renderMail, type RenderedMail } from './mail-layout';

const ROLE_WORDS = { member: 'a member', coach: 'a coach', owner: 'an owner' } as const;
const CAUTION =
  'Feedback on a video is coaching, not medical advice. If something hurts, stop the lift and see a doctor or a physiotherapist.';

/** Every mail the product sends, each from plain facts to subject, text and HTML. */
export const mails = {
  invitation: (facts: {
    gymName: string;
    invitedBy: string;
    name: string;
    role: keyof typeof ROLE_WORDS;
    link: string;
  }): RenderedMail =>
    renderMail({
      subject: `${facts.gymName} invites you to Midfoot`,
      heading: `${facts.name}, ${facts.gymName} would like to see you lift.`,
      paragraphs: [
        `${facts.invitedBy} invites you as ${ROLE_WORDS[facts.role]} of ${facts.gymName}.`,
        'Members film two or three reps from the front and from the side; a coach answers with the one thing to change before the hard sets.',
        'The link works once, for seven days.',
      ],
      action: { label: 'Accept the invitation', link: facts.link },
      reason: `You get this mail because ${facts.invitedBy} wrote your address into an invitation. If you do not know the gym, do nothing.`,
    }),

  resetPassword: (facts: { name: string; link: string }): RenderedMail =>
    renderMail({
      subject: 'Choose a new password for Midfoot',
      heading: 'Choose a new password.',
      paragraphs: [
        `Hello ${facts.name}, someone asked for a new password for your account. The link works once, for one hour.`,
      ],
      action: { label: 'Choose a new password', link: facts.link },
      reason: 'If it was not you, do nothing: your password stays as it is.',
    }),

  takeAnswered: (facts: {
    memberName: string;
    coachName: string;
    liftName: string;
    topCue: string;
    link: string;
  }): RenderedMail =>
    renderMail({
      subject: `${facts.coachName} answered your ${facts.liftName.toLowerCase()}`,
      heading: facts.topCue,
      paragraphs: [
        `${facts.memberName}, ${facts.coachName} has looked at your ${facts.liftName.toLowerCase()}. That is the one thing to change; the answer opens on the instant that matters.`,
        CAUTION,
      ],
      action: { label: 'See the answer', link: facts.link },
      reason: 'You get this mail because you sent a take to your gym.',
    }),

  takeUnplayable: (facts: {
    memberName: string;
    liftName: string;
    message: string;
    remedy: string;
    link: string;
  }): RenderedMail =>
    renderMail({
      subject: `Your ${facts.liftName.toLowerCase()} clip could not be used`,
      heading: 'One clip could not be used.',
      paragraphs: [`Hello ${facts.memberName}. ${facts.message}`, facts.remedy],
      action: { label: 'Send it again', link: facts.link },
      reason: 'You get this mail because you sent a take to your gym.',
    }),

  answerByNear: (facts: {
    coachName: string;
    memberName: string;
    liftName: string;
    answerBy: string;
    link: string;
  }): RenderedMail =>
    renderMail({
      subject: `${facts.memberName} needs an answer by ${facts.answerBy}`,
      heading: `${facts.memberName} still waits.`,
      paragraphs: [
        `${facts.coachName}, the ${facts.liftName.toLowerCase()} of ${facts.memberName} has no answer yet. It is needed by ${facts.answerBy}.`,
      ],
      action: { label: 'Open the queue', link: facts.link },
      reason: 'You get this mail because you coach at the gym, and only when an answer is nearly due.',
    }),
};
