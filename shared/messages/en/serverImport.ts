/** What the server says of a file of animals. */
export const serverImport = {
  'server.import.workbook': 'This is a workbook or a PDF. Save the sheet as CSV and choose that file.',
  'server.import.notText': 'This is not a text file. Save the sheet as CSV and choose that file.',
  'server.import.tooLarge': 'The file is larger than 4 MB. Split it and import the parts one after another.',
  'server.import.tooManyRows': 'The file has {count} rows; at most 20,000 can be imported at once.',
  'server.import.tooManyColumns': 'The file has {count} columns; at most 60 can be read.',
  'server.import.noRows': 'The file has no rows under its headings.',
  'server.import.quotes':
    'A quotation mark near line {line} is opened and never closed, so the rows after it cannot be told apart.',
  'server.import.askTag': 'Which column holds the visual tag?',
  'server.import.askDateOrder': 'Is the day or the month first in {columns}? The dates there can be read both ways.',
  'server.import.askClass':
    'The file has no class. Which class {count, plural, one {is the new animal} other {are the # new animals}}?',
  'server.import.askClassEmpty':
    'Which class {count, plural, one {is the new animal without one} other {are the # new animals without one}}?',
  'server.import.tooManyCells':
    'The row has more cells than the {count} headings: a comma inside a value needs quotation marks.',
  'server.import.tooLong': 'Longer than {count} characters.',
  'server.import.tagMissing': 'No tag.',
  'server.import.tagTwice': 'The same tag stands on line {lines} too.',
  'server.import.eidTwice': 'The same EID stands on line {lines} too.',
  'server.import.eidOfAnother': 'EID {eid} belongs to {tag} in this herd.',
  'server.import.animalLeft': '{tag} has left this herd.',
  'server.import.eidExponent':
    '“{value}”: a spreadsheet turned the EID into a rounded number and its figures are lost. Read it again from the reader’s own file, or set the column to text first.',
  'server.import.eidZeros':
    '“{value}” ends in nothing but zeros: a spreadsheet rounded it and its figures are lost. Read it again from the reader’s own file.',
  'server.import.eidLength': '“{value}” has {count, plural, one {# figure} other {# figures}}; an EID has 15.',
  'server.import.eidNotFigures': '“{value}” is not an EID: 15 figures, with or without spaces.',
  'server.import.classUnknown': '“{value}” is not a class: heifer, first calver, cow, dairy heifer or dairy cow.',
  'server.import.classDairy': '“{value}” could be either: write dairy heifer or dairy cow.',
  'server.import.numberUnreadable': '“{value}” cannot be read as a number. Write it without a thousands mark.',
  'server.import.weightRange': '“{value}” is no weight of one animal (above 0, at most 2,000 kg).',
  'server.import.conditionRange': '“{value}” is outside the condition scores 1 to 9.',
  'server.import.emptyUnreadable': '“{value}” says neither empty nor pregnant.',
  'server.import.dateUnreadable': '“{value}” cannot be read as a date. Write it as 2024-08-14 or 14 Aug 2024.',
  'server.import.dateNumber':
    '“{value}” is a bare number where a date should be. Write it as 2024-08-14 or 14 Aug 2024.',
  'server.import.dateImpossible': '“{value}” is not a date that exists, in the order of this column.',
  'server.import.dateFuture': '“{value}” lies in the future.',
  'server.import.dateOld': '“{value}” is longer ago than an animal lives.',
  'server.import.calvedBeforeBirth': 'The calving is not after the birth.',
  'server.import.doubleField': 'Two columns are both given as {field}. Leave one of them out.',
  'server.import.unanswered': 'Answer this before importing: {question}',
  'server.import.nothing': 'No row of the file can be imported.',
  'server.import.otherFile': 'An import with this id was made from another file. Choose the file again.',
} as const;
