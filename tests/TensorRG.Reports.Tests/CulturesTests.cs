using System.Globalization;

namespace TensorRG.Reports.Tests;

public class CulturesTests
{
    // Without this the three-culture tests could not fail.
    [Fact]
    public void The_test_cultures_do_change_unguarded_numbers()
    {
        Assert.Equal("1,5", Cultures.Run("comma", () => 1.5.ToString(CultureInfo.CurrentCulture)));
        Assert.Equal("\u22121'5", Cultures.Run("exotic", () => (-1.5).ToString(CultureInfo.CurrentCulture)));
        Assert.Equal("¤¤", Cultures.Run("exotic", () => double.NaN.ToString(CultureInfo.CurrentCulture)));
    }
}
