import type { DeskOwn, SaveKind, Stage } from '../desk/messages.ts';
import type { Language } from '../state.ts';

/** Words of the empty page and of the line above a page that was made on it. Messages on files stay as the program says them. */
export interface DeskWords {
  readonly lead: string;
  readonly drop: string;
  readonly choose: string;
  readonly formats: string;
  readonly code: string;
  readonly private: string;
  readonly caution: string;
  readonly stages: Readonly<Record<Stage, string>>;
  readonly cancel: string;
  readonly cancelled: string;
  readonly refused: string;
  readonly fault: string;
  readonly otherLanguage: string;
  readonly bar: string;
  readonly another: string;
  readonly saveAs: string;
  readonly save: Readonly<Record<SaveKind, string>>;
  /** What counts beside the model. */
  readonly own: {
    readonly lead: string;
    readonly give: Readonly<Record<keyof DeskOwn, string>>;
    readonly given: Readonly<Record<keyof DeskOwn, string>>;
    readonly leaveOut: (name: string) => string;
  };
  readonly mend: string;
  readonly mending: string;
  readonly saved: (file: string) => string;
  readonly whatIf: Readonly<Record<'title' | 'asIs' | 'size' | 'kind' | 'reading' | 'now' | 'back', string>>;
}

export const deskWords: Readonly<Record<Language, DeskWords>> = {
  en: {
    lead: 'Drop an IFC model. Its drains and vents are sized by the plumbing code and compared with what is drawn.',
    drop: 'Drop a model here',
    choose: 'or choose a file',
    formats: '.ifc, .ifc.gz or .ifczip. Several files dropped together are read as one building.',
    code: 'Plumbing code',
    private: 'Everything happens in this page. The model does not leave your machine.',
    caution:
      'An undersized drain or vent lets sewer gas into the building. Sizes here are a calculation aid: local code, the authority having jurisdiction and a licensed person decide.',
    stages: {
      unpacking: 'Opening the file',
      reading: 'Reading the building',
      sizing: 'Joining the pipes, sizing drains and vents',
      drawing: 'Drawing the page',
    },
    cancel: 'Cancel',
    cancelled: 'Cancelled. Nothing of the file is kept.',
    refused: 'This cannot be checked',
    fault: 'This is a fault of the program, not of your file. Please report it with these lines:',
    otherLanguage: 'Français',
    bar: 'Save and check anew',
    another: 'Another model',
    saveAs: 'Save',
    save: {
      ifc: 'Sized IFC',
      bcf: 'Issues (BCF)',
      csv: 'Take-off (CSV)',
      html: 'Report (HTML)',
      json: 'Result (JSON)',
      answers: 'Questions (JSON)',
    },
    own: {
      lead: 'An answers file, or a folder of local tables; dropped with the model, or chosen here:',
      give: { answers: 'Answers…', tables: 'Local tables…' },
      given: { answers: 'Answers:', tables: 'Local tables:' },
      leaveOut: (name) => `Leave out ${name}`,
    },
    mend: 'Find what mends it',
    mending: 'Looking for the least change …',
    saved: (file) => `Saved ${file}`,
    whatIf: {
      title: 'What if',
      asIs: 'as it is',
      size: 'Size',
      kind: 'Kind',
      reading: 'Its battery is read as',
      now: 'What if, not the model:',
      back: 'Back to the model',
    },
  },
  fr: {
    lead: 'Déposez un modèle IFC. Ses évacuations et ses évents sont dimensionnés selon le code de plomberie et comparés au dessin.',
    drop: 'Déposez un modèle ici',
    choose: 'ou choisissez un fichier',
    formats: '.ifc, .ifc.gz ou .ifczip. Plusieurs fichiers déposés ensemble sont lus comme un seul bâtiment.',
    code: 'Code de plomberie',
    private: 'Tout se passe dans cette page. Le modèle ne quitte pas votre ordinateur.',
    caution:
      "Une évacuation ou un évent trop petit laisse entrer les gaz d'égout dans le bâtiment. Ces calculs sont une aide : le code local, l'autorité compétente et une personne qualifiée décident.",
    stages: {
      unpacking: 'Ouverture du fichier',
      reading: 'Lecture du bâtiment',
      sizing: 'Assemblage des tuyaux, calcul des diamètres',
      drawing: 'Dessin de la page',
    },
    cancel: 'Annuler',
    cancelled: "Annulé. Rien du fichier n'est conservé.",
    refused: 'Vérification impossible',
    fault: "C'est une faute du programme, non de votre fichier. Veuillez la signaler avec ces lignes :",
    otherLanguage: 'English',
    bar: 'Enregistrer et vérifier de nouveau',
    another: 'Autre modèle',
    saveAs: 'Enregistrer',
    save: {
      ifc: 'IFC dimensionné',
      bcf: 'Problèmes (BCF)',
      csv: 'Métré (CSV)',
      html: 'Rapport (HTML)',
      json: 'Résultat (JSON)',
      answers: 'Questions (JSON)',
    },
    own: {
      lead: 'Un fichier de réponses ou un dossier de tables locales, déposé avec le modèle ou choisi ici :',
      give: { answers: 'Réponses…', tables: 'Tables locales…' },
      given: { answers: 'Réponses :', tables: 'Tables locales :' },
      leaveOut: (name) => `Laisser de côté ${name}`,
    },
    mend: 'Chercher le remède',
    mending: 'Recherche du moindre changement…',
    saved: (file) => `${file} enregistré`,
    whatIf: {
      title: 'Et si',
      asIs: 'tel quel',
      size: 'Diamètre',
      kind: 'Appareil',
      reading: 'Sa batterie est lue comme',
      now: 'Supposition, non le modèle :',
      back: 'Retour au modèle',
    },
  },
};
