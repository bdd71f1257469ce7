# Writes the netlist of the loop's drive: a loop of 8 pieces inside a sheath of 8 pieces, the coil as it shows at its top,
# the antenna and its buffer. Variables: arrangement = bare-after, bare-before or screened (bare: no sheath; after, before:
# where the series resistor stands, seen from the driver); k = coupling of the whole loop to the coil (0: stray field only).
function coupling(name, a, b, value) { printf "K%s %s %s %.8g\n", name, a, b, value }
BEGIN {
    pieces = 8
    loopL = 0.689e-6        # mu0 R (ln(8R/a) - 2), R = 100 mm, a = 0.45 mm
    sheathL = 0.538e-6      # the same with a = 1.5 mm
    sheathC = 63e-12        # 100 pF/m (50 ohm coaxial cable) times 0.628 m
    coilL = 22.43e-3; coilC = 15.68e-12; q = 250
    coilR = sqrt(coilL / coilC) / q
    antennaC = 0.02e-12     # top load to antenna
    inputC = 5e-12
    strayC = 0.02e-12       # the whole outer surface of the loop to the antenna
    lean = 0.2              # one side of the loop is this much nearer to the antenna than the middle
    print "* " arrangement ", k = " k
    print "Vdrive d 0 dc 0 ac 1 pulse(-2.5 2.5 0 15n 15n 3.3183u 6.6667u)"
    print "Rdriver d d1 3"
    print "Cblock d1 d2 4.7u"
    if (arrangement == "bare-after") { print "Rseries end sense 47"; print "Rhead d2 n0 1m" }
    else { print "Rseries d2 n0 47"; print "Rtail end sense 1m" }
    print "Vsense sense 0 0"
    for (i = 1; i <= pieces; i++) {
        to = i == pieces ? "end" : "n" i
        printf "L%d n%d %s %.8g\n", i, i - 1, to, loopL / pieces
        printf "Rl%d %s 0 100meg\n", i, to
        weight = 1 + lean * cos(2 * 3.14159265358979 * (i - 0.5) / pieces + 1.0)
        if (arrangement == "screened") {
            # The sheath is earthed where the loop is fed, and open opposite.
            from = i == 1 ? "0" : (i == pieces / 2 + 1 ? "sgap" : "s" (i - 1))
            end = i == pieces ? "0" : "s" i
            printf "Ls%d %s %s %.8g\n", i, from, end, sheathL / pieces
            coupling("s" i, "L" i, "Ls" i, sqrt(sheathL / loopL))
            printf "Cs%d %s %s %.8g\n", i, to, i == pieces ? "s" (i - 1) : "s" i, sheathC / pieces
            printf "Rs%d s%d 0 100meg\n", i, i
            if (i < pieces) printf "Ca%d s%d ant %.8g\n", i, i, strayC / pieces * weight
        } else {
            printf "Ca%d %s ant %.8g\n", i, to, strayC / pieces * weight
        }
        if (k > 0) coupling("c" i, "L" i, "Lcoil", k / sqrt(pieces))
    }
    if (arrangement == "screened") print "Rgap sgap 0 100meg"
    printf "Lcoil 0 c1 %.8g\nRcoil c1 top %.8g\nCcoil top 0 %.8g\n", coilL, coilR, coilC
    printf "Ctop top ant %.8g\nCin ant 0 %.8g\nRin ant 0 10meg\n", antennaC, inputC
    f0 = 1 / (2 * 3.14159265358979 * sqrt(coilL * (coilC + antennaC)))
    print ".control\nset noaskquit\nset numdgt=7"
    if (k > 0) {
        printf "ac lin 4001 %.1f %.1f\n", f0 * 0.98, f0 * 1.02
        print "let y = mag(v(ant))"
        print "meas ac peak max y"
        print "let peak_mv = peak * 1000"
        print "echo \"RAW peak_mv $&peak_mv\""
    } else {
        printf "ac lin 1 %.1f %.1f\n", f0, f0
        print "let feed_mv = mag(v(ant)) * 1000"
        print "echo \"RAW feed_mv $&feed_mv\""
    }
    if (k > 0 && arrangement == "screened") {
        split("8k 30k 150k 268k 600k 1meg 3meg", f, " ")
        for (i = 1; i <= 7; i++) {
            print "ac lin 1 " f[i] " " f[i]
            print "let ma = mag(i(vsense)) * 1000"
            print "echo \"RESULT drive.current_ma_per_volt.at_hertz_" f[i] " $&ma\""
        }
        print "tran 2n 20.0001u 13.3334u 2n uic"
        print "meas tran high max i(vsense)"
        print "meas tran low min i(vsense)"
        print "meas tran rms rms i(vsense)"
        print "let pp_ma = (high - low) * 1000"
        print "let rms_ma = rms * 1000"
        print "echo \"RESULT drive.current_ma_pp $&pp_ma\""
        print "echo \"RESULT drive.current_ma_rms $&rms_ma\""
        print "let r10 = low + 0.1 * (high - low)\nlet r90 = low + 0.9 * (high - low)"
        print "meas tran t10 when i(vsense)=r10 rise=1\nmeas tran t90 when i(vsense)=r90 rise=1"
        print "let edge_ns = (t90 - t10) * 1e9"
        print "echo \"RESULT drive.edge_ns_10_to_90 $&edge_ns\""
    }
    print "quit\n.endc\n.end"
}
