/** A table as a lab hands it over (invented): units in cells, decimal commas, a misspelt salt, a slipped point, a row twice, a mean. */
export const uglyTable = `conc,salt,Tcp up,Tcp dn,±,measured,remarks
0,blank,31.02,30.70,0.03,04.03.26,
50 mM,NaSCN,31.56,31.22,0.03,04.03.26,
0.08,NaSCN,31.69,31.33,0.03,04.03.26,
0.12,NaSCN,31.91,31.57,0.03,04.03.26,
"0,16",NaSCN,"31,98","31,66","0,03",05.03.26,new cell
"0,20",NaSCN,"32,09","31,74","0,03",05.03.26,
0.35,NaSNC,31.97,31.60,0.03,05.03.26,
0.40,NaSCN,318.6,31.51,0.03,05.03.26,
0.50,NaSCN,31.27,31.09,0.03,06.03.26,bubble?
0.60,NaSCN,31.47,31.12,,06.03.26,
0.60,NaSCN,31.47,31.12,,06.03.26,
0.70,NaSCN,31.15,30.81,0.03,06.03.26,
,,mean,,,,sum row
`
