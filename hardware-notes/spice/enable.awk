# Writes the netlist of the charge-pump enable with the traffic of the box's transmit line worked into its source.
# Variables: corner = typical, weak (pumps least) or slow (falls last); traffic = sparse (one alive line each 50 ms for
# 0.5 s), full (lines without a pause for 20 ms) or single (one alive line).
function level(t, v) { printf "+ %.9g %.4g %.9g %.4g\n", t, last, t + 0.1e-6, v; last = v }
function send(text, t,   i, b, bit, code) {
    for (i = 1; i <= length(text); i++) {
        code = index(ascii, substr(text, i, 1)) + 31
        if (substr(text, i, 1) == "\n") code = 10
        # Start bit low, eight data bits from the least, stop bit high. The inverter turns them over.
        if (last != supply) level(t, supply)
        for (b = 0; b < 8; b++) {
            bit = code % 2 ? 0 : supply
            code = int(code / 2)
            if (bit != last) level(t + (b + 1) * bitS, bit)
        }
        if (last != 0) level(t + 9 * bitS, 0)
        t += 10 * bitS
    }
    return t
}
BEGIN {
    ascii = ""
    for (i = 32; i < 127; i++) ascii = ascii sprintf("%c", i)
    bitS = 1 / 115200
    supply = 5; c1 = 47e-9; c2 = 1e-6; r2 = 150e3; serial = 150; leakA = 0.1e-6
    if (corner == "weak") { supply = 4.75; c1 *= 0.9; c2 *= 1.1; r2 *= 0.95; serial = 200; leakA = 1e-6 }
    if (corner == "slow") { supply = 5.25; c1 *= 1.1; c2 *= 1.1; r2 *= 1.05; serial = 120; leakA = 0 }
    alive = "<7 41 alive 612345 " crc "\n"
    print "* enable, " corner ", " traffic
    print "Vtx tx 0 pwl("
    last = 0
    print "+ 0 0"
    t = 1e-3
    if (traffic == "sparse") for (n = 0; n < 10; n++) { end = send(alive, t); t += 50e-3 }
    if (traffic == "single") end = send(alive, t)
    if (traffic == "full") while (t < 0.02) { t = send(alive, t); end = t }
    print "+ )"
    printf "Rs tx a %g\nC1 a b %.6g\nDa 0 b signal\nDb b res signal\nC2 res 0 %.6g\nR2 res 0 %g\nIleak res 0 %g\n", serial, c1, c2, r2, leakA
    # At rest the pull of the leak stops at zero.
    print "Dz 0 res signal"
    print ".model signal D(IS=2.5n N=1.75 RS=1 CJO=4p TT=4n)"
    print ".options reltol=1e-4 method=gear"
    print ".control\nset noaskquit\nset numdgt=7"
    printf "tran 20u %.6g 0 1m\n", end + (traffic == "single" ? 0.05 : 0.7)
    printf "let line_bytes = %d\n", length(alive)
    key = "RESULT enable." corner "." traffic
    if (traffic != "full") {
        print "meas tran up when v(res)=2.1 rise=1"
        print "let up_ms = (up - 1m) * 1e3"
        print "echo \"" key ".up_ms_to_2.1_volt $&up_ms\""
    }
    if (traffic == "single") {
        printf "meas tran after max v(res) from=%.6g to=%.6g\n", end, end + 0.01
        print "echo \"" key ".volt_after_the_line $&after\""
    }
    if (traffic == "sparse") {
        print "meas tran low min v(res) from=0.25 to=0.45"
        print "meas tran high max v(res) from=0.25 to=0.45"
        print "echo \"" key ".lowest_volt $&low\""
        print "echo \"" key ".highest_volt $&high\""
    }
    if (traffic != "single") {
        printf "meas tran top max v(res)\n"
        print "meas tran down when v(res)=0.5 fall=last"
        printf "let down_ms = (down - %.9g) * 1e3\n", end
        print "echo \"" key ".down_ms_to_0.5_volt $&down_ms\""
        print "echo \"" key ".top_volt $&top\""
    }
    print "quit\n.endc\n.end"
}
