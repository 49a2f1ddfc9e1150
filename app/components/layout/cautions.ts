/** The cautions that the product must show, word for word wherever they stand. */
export const cautions = {
  fire: 'If it is smoking or burning: raise the alarm, get out, call the emergency number. Then report.',
  eyes: 'Do not look at the sun, at its reflection, or along the beam, even with sunglasses. Do not look through a lens or telescope toward the sun. Do not put a hand, face or card into the beam. Work out where it falls from the mark and the geometry; photograph the lit surface from well outside the beam, never the optic.',
  sight: 'Blurred or dark spots in your sight: get medical help now.',
  noReenactment: 'Do not focus sunlight on anything that can burn to see if it would. Use geometry and, if a test is needed, a competent laboratory.',
  roof: 'Only go up if authorised, by a safe route, not alone; treat any roof and rooflight as fragile until a competent person says otherwise. Report from the hatch if unsure.',
  heat: 'Metal, membrane and glass near a beam may burn skin. Keep hands, hair, aerosols, gas bottles and batteries out of it.',
  evidence: 'Cover or shade rather than move. If you must move it, photograph first and say how it stood. Do not clean, throw away, or repair before release.',
  people: 'No faces, no names. If a child or visitor is involved, tell the person in charge of the site.',
  estimates: 'Estimates from the values entered. Not a certificate, design approval, legal cause, or proof that a place is safe. A not sunlit result is only as good as the bearing, time and skyline.',
  defer: 'Follow your local law, fire service, codes and licensed practitioners. Reporting duties shown are prompts; check the current rule.',
  privilege: 'Marking a record does not make it privileged. Ask a lawyer.',
  health: 'Write only what is needed. Injury details go in the injury box, not in the story.',
  film: 'Film or shading on glass may overheat or crack panes: ask the glazing maker.',
} as const;

export type CautionName = keyof typeof cautions;
