const advice: Readonly<Record<string, string>> = {
  'fixture-unconnected':
    'Dessinez l’évacuation de chaque appareil qui n’en a pas, de sa sortie jusqu’à un branchement ; aucun plan ne peut en tenir lieu.',
  'no-sewer-end':
    'Dessinez la sortie vers l’égout, donnez-lui un nom ou un système qui le dise, ou répondez sewerEnds avec cette extrémité.',
  'files-apart': 'Exportez tous les fichiers avec la même origine, ou vérifiez-les un à un.',
  'outlet-pipe-too-long': 'Dessinez le siphon plus près de son appareil, ou l’appareil plus près de son siphon.',
  'unvented-trap':
    'Dessinez un évent depuis l’évacuation de chacun de ces appareils : aucun chemin vers l’air libre ou vers un évent n’a été trouvé.',
  'trap-arm-too-long': 'Dessinez l’évent plus près du siphon, ou l’appareil plus près de son évent.',
  backfall: 'Dessinez le tuyau avec une pente vers l’égout : ses extrémités sont inversées.',
  'slope-too-small':
    'Posez le tuyau à sa pente minimale ; si ses extrémités sont fixes, leurs hauteurs doivent changer.',
  'vent-joins-too-low':
    'Dessinez l’évent de sorte qu’il rejoigne les autres au-dessus du niveau de débordement desservi.',
  'vent-stack-misplaced':
    'Dessinez le pied de la colonne d’évent au droit ou au-dessous du raccord le plus bas de sa colonne.',
  'yoke-vent-misplaced':
    'Dessinez l’évent de liaison depuis le dessous du branchement de l’étage, comme le dit l’article.',
  'branch-too-long': 'Dessinez le branchement plus court, avec moins de coudes, ou avec son propre évent.',
  'branch-near-foot': 'Dessinez le branchement ailleurs : plus loin du pied de la colonne.',
  'appliance-not-allowed': 'Choisissez un autre système ou un autre appareil : aucun diamètre n’y remédie.',
  'valve-not-allowed': 'Menez cet évent à l’air libre au lieu d’un clapet d’admission d’air.',
  'island-vent-not-allowed': 'Menez cet évent à l’air libre sans descente, ou ventilez l’appareil autrement.',
  'waste-stack-vent-not-allowed': 'Donnez leurs propres évents aux appareils de cette colonne.',
  'combination-not-allowed': 'Donnez leurs propres évents à ces appareils, ou évacuez-les à part.',
  'single-stack-not-allowed': 'Donnez leurs propres évents aux branchements de cette colonne.',
  'common-vent-not-allowed': 'Donnez à chacun des deux appareils son propre évent.',
  'closet-needs-larger': 'Raccordez ces W.-C. à un tuyau plus grand, ou moins de W.-C. à celui-ci.',
  'wet-vent-overloaded': 'Raccordez moins d’appareils à cet évent mouillé, ou donnez à certains leurs propres évents.',
  'vent-area-too-small': 'Dessinez un évent de plus du collecteur principal à l’air libre, ou un plus grand.',
};

/** What a person has to draw or say where no plan settles an error. */
export const frenchAdvice = (code: string): string =>
  (Object.hasOwn(advice, code) ? advice[code] : undefined) ??
  'Celle-ci revient au concepteur : le programme ne connaît aucun changement qui y remédie.';
