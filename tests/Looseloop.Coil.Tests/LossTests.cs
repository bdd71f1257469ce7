namespace Looseloop.Coil.Tests;

public class LossTests
{
    // IACS copper: 66.0848 um at 1 MHz, 132.170 um at 250 kHz.
    [Theory]
    [InlineData(1e6, 66.0848e-6)]
    [InlineData(250e3, 132.170e-6)]
    public void Skin_depth(double frequencyHz, double expectedM) => Assert.Equal(1, SkinEffect.DepthM(frequencyHz) / expectedM, 5e-6);

    // Exact Bessel ratio, evaluated independently.
    [Theory]
    [InlineData(1, 1.020492)]
    [InlineData(1.5, 1.097328)]
    [InlineData(2, 1.264643)]
    [InlineData(3, 1.768132)]
    [InlineData(5, 2.768108)]
    public void Round_wire(double radiusOverDepth, double expected) =>
        Assert.Equal(expected, SkinEffect.RoundWireRatio(radiusOverDepth), 1e-6);

    [Fact]
    public void Round_wire_has_its_limits_and_no_seams()
    {
        Assert.Equal(1, SkinEffect.RoundWireRatio(0), 1e-15);
        Assert.Equal(SkinEffect.RoundWireRatio(199.9999), SkinEffect.RoundWireRatio(200.0001), 2e-4);
        Assert.Equal(SkinEffect.RoundWireRatio(.000999), SkinEffect.RoundWireRatio(.001001), 1e-12);
    }

    // Dowell, Proc. IEE 113 (1966) 1387, one layer.
    [Theory]
    [InlineData(1, 1.085636)]
    [InlineData(2, 1.897806)]
    [InlineData(3, 3.010136)]
    public void Dowells_layer(double xi, double expected) => Assert.Equal(expected, Dowell.SingleLayerRatio(xi), 1e-6);

    [Fact]
    public void Dowells_layer_has_no_seams()
    {
        Assert.Equal(Dowell.SingleLayerRatio(.0499999), Dowell.SingleLayerRatio(.0500001), 1e-8);
        Assert.Equal(Dowell.SingleLayerRatio(299.9999), Dowell.SingleLayerRatio(300.0001), 1e-3);
    }

    // Medhurst, Wireless Engineer 24 (1947): linear interpolation of his H table.
    [Fact]
    public void Medhursts_capacitance() => Assert.Equal(8.32, Medhurst.SelfCapacitanceF(.11, .48) * 1e12, .01);

    // Cells of his phi table, and the interpolated one of the sample coil.
    [Theory]
    [InlineData(0, 1, 5.31)]
    [InlineData(2, .5, 1.74)]
    [InlineData(4, .9, 3.05)]
    [InlineData(10, .7, 2.37)]
    [InlineData(10, .1, 1.04)]
    [InlineData(4.36364, .833333, 2.742)]
    public void Medhursts_phi(double lengthOverDiameter, double wireOverPitch, double expected) =>
        Assert.Equal(expected, Medhurst.Phi(lengthOverDiameter, wireOverPitch), 5e-4);

    // Loaded sample coil: Rdc 47.41 ohm; Q 723 by skin alone, 343 Dowell, 264 phi times skin, 375 phi times thin skin.
    [Fact]
    public void Q_of_the_sample_coil()
    {
        QEstimate q = QEstimate.Of(SampleCoil.Loaded, ModeSolver.Lowest(new FieldModel(SampleCoil.Loaded, Resolution.Fine), 1)[0]);
        Assert.Equal(47.41, q.DirectOhm, .01);
        Assert.Equal(3.14, q.WireOverSkin, .005);
        Assert.Equal(723, q.SkinOnly, 1.0);
        Assert.Equal(343, q.Dowell, 1.0);
        Assert.Equal(264, q.MedhurstTimesSkin, 1.0);
        Assert.Equal(375, q.MedhurstThinSkin, 1.0);
        Assert.Equal(q.MedhurstTimesSkin, q.Low);
        Assert.Equal(q.MedhurstThinSkin, q.High);
    }

    // With the load on the current is nearly even, and the handbook's w L / R says the same within half a per cent.
    [Fact]
    public void Even_current_is_close_where_the_top_load_is_large()
    {
        Mode mode = ModeSolver.Lowest(new FieldModel(SampleCoil.Loaded, Resolution.Fine), 1)[0];
        Assert.Equal(1, QEstimate.OfEvenCurrent(SampleCoil.Loaded, mode.FrequencyHz, 22.5727e-3).Dowell
            / QEstimate.Of(SampleCoil.Loaded, mode).Dowell, .005);
    }
}
