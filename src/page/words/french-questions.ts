import type { Question } from '../../schedule/question.ts';

/** A question of the result by where its answer goes. */
export function frenchAsk({ part, key, field }: Question['answer'], name: string): string {
  switch (part) {
    case 'sewerEnds':
      return `L’eau sort-elle par ${name} ? Sinon, nommez le tuyau qui va à l’égout.`;
    case 'fixtures':
      if (field === 'kind') return `Qu’est-ce que ${name} ? Rien dans la maquette ne le dit.`;
      return field === 'space'
        ? 'Lesquels de ces appareils se trouvent dans une même salle de bains ? Donnez à chacun le nom de sa pièce.'
        : `De quelle sorte est ${name} ?`;
    case 'batteries':
      return `Comment le groupe de ${name} est-il conçu ? Plus d’une lecture tient.`;
    case 'settings':
      if (key === 'use')
        return 'Les appareils sont-ils à usage privé, public ou de rassemblement ? Leur charge en dépend.';
      if (key === 'entries')
        return 'Comment les branchements entrent-ils dans les colonnes : à 45° ou moins, ou avec un rayon au moins égal à leur diamètre intérieur, ou à l’équerre ?';
      if (key === 'sumpPumpFlow')
        return 'Quel est le débit de la pompe de la fosse, en litres par seconde ? Sa ventilation en dépend.';
      return 'La maquette laisse-t-elle des jeux entre des tuyaux raccordés ? Si oui, donnez le plus large, en mètres, de plus de 0,05.';
    default:
      return field === 'slope'
        ? 'À quelle pente pose-t-on les évacuations dessinées de niveau ? En mètres par mètre, par exemple 0,02.'
        : `Quel est le diamètre de ${name} ?`;
  }
}
