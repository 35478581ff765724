/** An invented catalogue in the form of the archives: a description, and the rows of one of its tables. */

const RULE = "-".repeat(80);

export const README = `J/Inv/1/1     Red dwarfs of an invented sky     (Nobody+, 2031)
${"=".repeat(80)}
Red dwarfs of an invented sky.
    Nobody A., Noone B.
   <Invented Letters 1, 1 (2031)>
${"=".repeat(80)}
Abstract:
    Nothing in it stands for anything in the sky.

File Summary:
${RULE}
 FileName      Lrecl  Records   Explanations
${RULE}
ReadMe            80        .   This file
table1.dat        73        4   Positions
refs.dat          19        2   References
${RULE}

Byte-by-byte Description of file: table1.dat
${RULE}
   Bytes Format Units      Label   Explanations
${RULE}
   1-  8 A8     ---        Name    Name of the star (1)
      10 I1     ---        Flag    [0/3] A flag that means
                                     nothing and runs over
                                     three lines
  12- 13 I2     h          RAh     Hour of Right Ascension (J2000)
  15- 16 I2     min        RAm     Minute of Right Ascension (J2000)
  18- 22 F5.2   s          RAs     Second of Right Ascension (J2000)
      24 A1     ---        DE-     Sign of the Declination (J2000)
  25- 26 I2     deg        DEd     Degree of Declination (J2000)
  28- 29 I2     arcmin     DEm     Arcminute of Declination (J2000)
  31- 36 F6.3   arcsec     DEs     Arcsecond of Declination (J2000)
  38- 42 F5.2   [-]        [Fe/H]  ?=--- Metallicity
  44- 48 F5.3   [cm/s2]    logg    ?=-9.99 Surface gravity
  50- 54 F5.2   mas        plx     *? Parallax
  56- 73 I18    ---        ID      ? Identifier
${RULE}
Note (1): Names are
    made up.
${RULE}

Byte-by-byte Description of file: refs.dat
${RULE}
   Bytes Format Units      Label   Explanations
${RULE}
   1- 19 A19    ---        Ref     Bibliographic code
${RULE}

${"=".repeat(80)}
(End)                                        Nobody [Nowhere]       01-Jan-2031
`;

export const DATA = `Star 1   1 00 42 44.33 -00 12 14.966 -0.12 4.812  3.14 314159265358979323
Star 2   0 11 59 60.00 +41 16  8.000   --- -9.99                            
Star 3   3 23 59 59.99 -89 59 59.999  0.30 5.010 12.00 -1                
Star 4   2 05 30 15.00 +05 30 30.000 -0.05 4.500  0.50                    
`;

/** The same in one file, as the machine-readable tables of journals are. */
export const ONE_FILE = `Title: Red dwarfs of an invented sky
Authors: Nobody A., Noone B.
Table: Positions
${"=".repeat(80)}
${README.slice(README.indexOf("Byte-by-byte"), README.indexOf("\n\nByte-by-byte Description of file: refs"))}
${DATA}`;
